import { useEffect, useRef, useState } from "react";
import { useParams } from "react-router";
import { FieldErrors } from "#app/components/forms/Field";
import { newCommandId, sendPhoto } from "#app/components/forms/sendPhoto";
import { Fitting } from "#app/components/ui/Fitting";
import { useLive } from "#app/components/ui/useLive";
import type { FieldProps } from "#app/lib/schemas/form-reply";

interface PhotoInputProps extends FieldProps {
  label: string;
  hint?: string;
  /** How many may be chosen. */
  most?: number;
  optional?: boolean;
  /** One field with the ids parted by commas; else one field for each. */
  joined?: boolean;
}

interface Upload {
  commandId: string;
  picture: File;
  share: number;
  state: "sending" | "here" | "failed";
  file: string;
  why: string;
  again: boolean;
}

/**
 * Pictures to go with a record. With scripts each is sent as soon as it is chosen, by itself, and can be sent again; the form then
 * carries their ids. Without scripts they go with the form. Those that arrived with a form that came back stay in it: `defaultValue` has
 * their ids, parted by commas.
 */
export function PhotoInput({ id, name, label, hint, most = 10, optional = true, defaultValue, joined = true, errors }: PhotoInputProps) {
  const here = defaultValue.split(",").filter(Boolean);
  const live = useLive();
  const { installId } = useParams();
  const [uploads, setUploads] = useState<Upload[]>([]);
  const box = useRef<HTMLDivElement>(null);
  const [waits, setWaits] = useState(false);
  const change = (commandId: string, to: Partial<Upload>) =>
    setUploads((all) => all.map((u) => (u.commandId === commandId ? { ...u, ...to } : u)));

  async function send({ commandId, picture }: Pick<Upload, "commandId" | "picture">) {
    change(commandId, { state: "sending", share: 0, why: "" });
    const sent = await sendPhoto(`/api/v1/installs/${installId}/photos`, commandId, picture, (share) => change(commandId, { share }));
    change(commandId, sent.ok ? { state: "here", file: sent.file, share: 1 } : { state: "failed", why: sent.why, again: sent.again });
  }

  function take(input: HTMLInputElement) {
    const room = Math.max(0, most - here.length - uploads.filter((u) => u.state !== "failed").length);
    const chosen = [...(input.files ?? [])].slice(0, room).map((picture) => ({ commandId: newCommandId(), picture }));
    setUploads((all) => [...all, ...chosen.map((c): Upload => ({ ...c, share: 0, state: "sending", file: "", why: "", again: false }))]);
    // What is sent by itself must not go with the form once more.
    input.value = "";
    for (const one of chosen) void send(one);
  }

  // What came back with the form has become part of it: it is not listed as sent once more.
  useEffect(() => {
    const known = defaultValue.split(",");
    setUploads((all) => (all.some((u) => known.includes(u.file)) ? all.filter((u) => !known.includes(u.file)) : all));
  }, [defaultValue]);

  const sending = uploads.some((u) => u.state === "sending");
  useEffect(() => {
    const form = box.current?.closest("form");
    if (!form || !sending) return setWaits(false);
    const hold = (event: Event) => {
      event.preventDefault();
      event.stopPropagation();
      setWaits(true);
    };
    form.addEventListener("submit", hold, true);
    return () => form.removeEventListener("submit", hold, true);
  }, [sending]);

  const ids = [...here, ...uploads.flatMap((u) => (u.state === "here" ? [u.file] : []))];
  return (
    <div className="field photo-field" ref={box}>
      <label htmlFor={id}>
        {label} {optional && <span className="field-optional">(may stay empty)</span>}
      </label>
      <p className="field-hint" id={`${id}-hint`}>
        {hint && `${hint} `}JPEG, PNG or WebP, up to 12 MB{most > 1 ? ` each, ${most} at most` : ""}. Place and device are taken out of it.
      </p>
      <input
        id={id}
        name={live ? undefined : name}
        type="file"
        accept="image/jpeg,image/png,image/webp"
        multiple={most > 1}
        onChange={live ? (event) => take(event.currentTarget) : undefined}
        aria-describedby={`${id}-hint${errors?.length ? ` ${id}-error` : ""}`}
        aria-invalid={Boolean(errors?.length) || undefined}
      />
      {joined ? ids.length > 0 && <input type="hidden" name={name} value={ids.join(",")} /> : null}
      {!joined && ids.map((file) => <input key={file} type="hidden" name={name} value={file} />)}
      {here.length > 0 && <p>{here.length === 1 ? "1 photo is here already." : `${here.length} photos are here already.`}</p>}
      {uploads.length > 0 && (
        <ul className="photo-uploads" aria-label="Sent">
          {uploads.map((u) => (
            <li key={u.commandId}>
              {u.state === "here" ? (
                <img src={`/files/${u.file}?small`} alt="" width="72" height="54" />
              ) : (
                <span className="photo-none" aria-hidden="true" />
              )}
              <div className="min-w-0">
                <p className="truncate">{u.picture.name}</p>
                {u.state === "sending" && <progress value={u.share} max={1} aria-label={`${u.picture.name} is on its way`} />}
                <p role="status">{u.state === "here" ? "arrived" : u.state === "failed" ? u.why : `${Math.round(u.share * 100)} % sent`}</p>
              </div>
              <span className="flex gap-2">
                {u.state === "failed" && u.again && (
                  <Fitting type="button" onClick={() => void send(u)}>
                    Send again
                  </Fitting>
                )}
                {u.state !== "sending" && (
                  <Fitting
                    type="button"
                    variant="quiet"
                    label={`Take ${u.picture.name} out`}
                    onClick={() => setUploads((all) => all.filter((x) => x.commandId !== u.commandId))}
                  >
                    Take out
                  </Fitting>
                )}
              </span>
            </li>
          ))}
        </ul>
      )}
      {waits && sending && (
        <p role="alert" className="field-error">
          A photo is still on its way. Wait until it has arrived, then record.
        </p>
      )}
      <FieldErrors id={`${id}-error`} errors={errors} />
    </div>
  );
}
