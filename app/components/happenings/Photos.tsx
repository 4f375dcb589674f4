import { useRef } from "react";
import { Fitting } from "#app/components/ui/Fitting";

interface PhotosProps {
  files: string[];
  /** What they show: the text for whoever cannot see them. */
  of: string;
}

/** Pictures of one record as small copies; each opens in full over the page, and by itself without scripts. */
export function Photos({ files, of }: PhotosProps) {
  if (!files.length) return null;
  return (
    <ul className="flex flex-wrap gap-2">
      {files.map((file, n) => (
        <li key={file}>
          <Photo file={file} says={files.length > 1 ? `${of}, photo ${n + 1} of ${files.length}` : of} />
        </li>
      ))}
    </ul>
  );
}

function Photo({ file, says }: { file: string; says: string }) {
  const dialog = useRef<HTMLDialogElement>(null);
  const full = `/files/${file}`;
  return (
    <>
      <a
        href={full}
        className="block"
        onClick={(event) => {
          if (!dialog.current?.showModal || event.metaKey || event.ctrlKey) return;
          event.preventDefault();
          dialog.current.showModal();
        }}
      >
        <img src={`${full}?small`} alt={says} width="150" height="100" loading="lazy" className="h-[100px] w-[150px] object-cover" />
      </a>
      <dialog ref={dialog} className="photo-view" aria-label={says}>
        <div className="photo-view-bar">
          <p>{says}</p>
          <Fitting href={full} document>
            By itself
          </Fitting>
          <Fitting type="button" onClick={() => dialog.current?.close()}>
            Close
          </Fitting>
        </div>
        {/* Scrolls and zooms by touch and wheel as any page does; a press shows it as large as it was taken. */}
        <label className="photo-view-pane">
          <input type="checkbox" className="sr-only" aria-label="As large as it was taken" />
          <img src={full} alt={says} loading="lazy" />
        </label>
      </dialog>
    </>
  );
}
