import type { SelectOption } from "#app/components/forms/Select";
import { type Entry, NO_ENTRY } from "#app/components/gate/entry";
import { Given } from "#app/components/gate/Given";
import { ItemHistory } from "#app/components/gate/ItemHistory";
import { NumberEntry } from "#app/components/gate/NumberEntry";
import { ProofActs, ProofWays } from "#app/components/gate/ProofActs";
import { ProveForm, type SheetResultModel } from "#app/components/gate/ProveForm";
import { RecordWays } from "#app/components/gate/RecordWays";
import { cx } from "#app/components/ui/cx";
import { Fitting } from "#app/components/ui/Fitting";
import { ItemNut } from "#app/components/ui/ItemNut";
import { Notice } from "#app/components/ui/Notice";
import type { ItemView } from "#app/lib/views/gate-item";

/** What came back for this row from the last send. */
export interface RowReply {
  entry: Entry;
  refusal: { title: string; message: string; more: string[] } | null;
  result: SheetResultModel | null;
}

export interface RowShared {
  units: "si" | "us";
  tools: SelectOption[];
  people: SelectOption[];
  zone: string;
  setUpHref: string;
  live: boolean;
  /** Ids of commands by item and act, made when the page was drawn. */
  commandId: (item: string, act: string) => string;
}

interface ItemRowProps {
  item: ItemView;
  reply: RowReply | null;
  shared: RowShared;
  busy: boolean;
}

/** A wide row: the left end is the tick, evidence opens in the row, the caution stands above. */
export function ItemRow({ item, reply, shared, busy }: ItemRowProps) {
  const formId = `prove-${item.id}`;
  const entry = reply?.entry ?? NO_ENTRY;
  const askable = !item.computed && item.prove.roles.length > 0 && !item.prove.numberMissing;
  const open = item.open || (reply !== null && askable);
  const lapsed = item.nut === "lapsed";
  const second = item.nut === "second-eyes";
  return (
    <li id={item.anchor} className={cx("item", `item-${item.nut}`)}>
      <TickEnd item={item} formId={open && askable && item.prove.ok ? formId : null} />
      <div className="item-says">
        <h2>
          <span className="item-key fig">{item.key}</span>
          <span className="item-words">
            {item.words}
            {item.marks.map((mark) => (
              <small key={mark}>{mark}</small>
            ))}
          </span>
        </h2>
        {item.caution && (
          <p className="item-caution">
            <b>Caution:</b> {item.caution}
          </p>
        )}
        {item.proof &&
          (lapsed || item.nut === "todo" ? <p className="item-was">{item.proof.words || "ticked"}</p> : <Given given={item.proof.given} />)}
        {item.proof?.note && <p className="item-note">{item.proof.note}</p>}
        {item.proof?.said.map((line) => (
          <p key={line} className="item-note">
            {line}
          </p>
        ))}
        {second && item.reasons[0] && (
          <p>
            <b>{item.reasons[0].sentence}</b> {item.reasons[0].who}
          </p>
        )}
        {item.source && <p className="item-source">{item.source}</p>}
      </div>
      <div className="item-who">
        {item.proof && (
          <p>
            <b>{item.proof.did}</b>
            <span>{item.proof.when}</span>
            {item.proof.recordedBy && <span>written down by {item.proof.recordedBy}</span>}
            {item.proof.tools && <span>with {item.proof.tools}</span>}
          </p>
        )}
      </div>
      <div className="item-open">
        {reply?.refusal && (
          <Notice kind="refused" title={reply.refusal.title} role="alert">
            <p>{reply.refusal.message}</p>
            {reply.refusal.more.map((line) => (
              <p key={line}>{line}</p>
            ))}
          </Notice>
        )}
        {lapsed && item.reasons[0] && (
          <Notice kind="lapsed" title={`Lapsed: ${item.reasons[0].sentence}`}>
            {item.reasons.slice(1).map((r) => (
              <p key={r.sentence}>{r.sentence}</p>
            ))}
          </Notice>
        )}
        {item.wanted && <Notice kind="plain" title={item.wanted.sentence} />}
        {item.first.map((first) => (
          <Notice key={first.href} kind="plain" title={first.sentence} action={<Fitting href={first.href}>{first.act}</Fitting>} />
        ))}
        {item.nut === "todo" && item.reasons[0] && (item.proof || item.computed || !open) && !item.prove.numberMissing && (
          <p className="item-reason">
            {item.prove.roles.length > 0 && !item.prove.ok ? item.prove.reason : item.reasons[0].sentence}{" "}
            {!open && item.reasons[0].who && <span>{item.reasons[0].who}</span>}
          </p>
        )}
        {item.parts.map((part) => (
          <NumberEntry
            key={part.n}
            item={item.id}
            part={part}
            commandId={shared.commandId(item.id, `n${part.n}`)}
            entry={entry}
            setUpHref={shared.setUpHref}
            reason={item.enterNumber.ok ? "" : item.enterNumber.reason}
          />
        ))}
        <ProofActs item={item} commandId={shared.commandId} entry={entry} />
        {askable && open && <ProveForm key={item.proof?.id ?? "first"} {...formProps(item, formId, entry, reply, shared, busy)} />}
        <div className="item-ways">
          {askable && !open && (
            <details className="item-again">
              <summary>{item.proof ? "Correct it, or record it anew" : "Record it"}</summary>
              <ProveForm key={item.proof?.id ?? "first"} {...formProps(item, formId, entry, reply, shared, busy)} />
            </details>
          )}
          <ProofWays item={item} commandId={shared.commandId} entry={entry} />
          <RecordWays links={item.record} about={item.key} offers={item.offersLooseEnd} />
          <ItemHistory proofs={item.history} name={item.key} />
        </div>
      </div>
    </li>
  );
}

function formProps(item: ItemView, formId: string, entry: Entry, reply: RowReply | null, shared: RowShared, busy: boolean) {
  const { units, tools, people, zone, live } = shared;
  const commandId = shared.commandId(item.id, "prove");
  return { item, formId, commandId, entry, result: reply?.result ?? null, units, tools, people, zone, live, busy };
}

/** The whole left end: it sends the row where there is something to do, and only shows the state where there is not. */
function TickEnd({ item, formId }: { item: ItemView; formId: string | null }) {
  const inside = (
    <>
      <ItemNut state={item.nut} size={66} />
      <span>{item.word}</span>
    </>
  );
  return formId ? (
    <button
      type="submit"
      form={formId}
      name="intent"
      value="prove"
      className="tick"
      aria-label={`${item.word}: ${item.key}, press when it is done`}
    >
      {inside}
    </button>
  ) : (
    <div className="tick">{inside}</div>
  );
}
