import { Notice } from "#app/components/ui/Notice";
import { count } from "#app/lib/gates/who";
import type { AgainView } from "#app/lib/views/gate-again";
import { listOf } from "#app/lib/views/places";

/** What has to be done again here and why, before the rows that say it one by one. */
export function AgainBand({ again }: { again: AgainView }) {
  const items = again.causes.reduce((n, c) => n + c.items.length, 0);
  return (
    <Notice kind="lapsed" title={`${count(items, "item")} to do again.`} band>
      {again.causes.map(({ sentence, items: fallen }) => (
        <p key={sentence}>
          {fallen.map((item, n) => (
            <span key={item.key}>
              {n > 0 && ", "}
              <a href={`#${item.anchor}`} className="fig font-semibold">
                {item.key}
              </a>
            </span>
          ))}
          : {sentence}
        </p>
      ))}
      {again.back.length > 0 && (
        <p>
          {listOf(again.back)} only {again.back.length === 1 ? "waits" : "wait"} for this gate: signed again here,{" "}
          {again.back.length === 1 ? "it stands" : "they stand"} again with the signatures that{" "}
          {again.back.length === 1 ? "it has" : "they have"}.
        </p>
      )}
    </Notice>
  );
}
