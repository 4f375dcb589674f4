import { ItemNut } from "#app/components/ui/ItemNut";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { mailLog } from "#app/db/queries/mail-log.server";
import { installContext } from "#app/lib/http/install.server";
import { mailView } from "#app/lib/views/mail";
import type { Route } from "./+types/_app.installs.$installId.mail";

export const meta: Route.MetaFunction = () => [{ title: "Mail · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { installId, now, snapshot } = context.get(installContext);
  return mailView(await mailLog(db(), installId), now, snapshot.install.timeZone);
}

const NUT = { sent: "done", waiting: "todo", "given up": "lapsed" } as const;

export default function Mail({ loaderData: view }: Route.ComponentProps) {
  return (
    <main id="main">
      <TitlePipe title="Mail" state={view.state} fill={view.sent} />
      {view.lost > 0 && (
        <Notice kind="danger" title={view.lost === 1 ? "1 mail did not get through." : `${view.lost} mails did not get through.`} band>
          No mail is not a no-go: tell these people yourself, and check their addresses.
        </Notice>
      )}
      {view.groups.length === 0 && (
        <p className="max-w-[62ch] px-4 py-6 text-lead tablet:px-6">
          Mails about runs show here: GO, no-go and HOLD, each with who got it and when. The first goes out when a lead calls GO or sends a
          no-go.
        </p>
      )}
      {view.groups.map((group) => (
        <section key={group.id} aria-labelledby={group.id} className="border-b-2 border-ink px-4 py-4 tablet:px-6">
          <h2 id={group.id} className="text-h3 leading-snug">
            {group.subject}
          </h2>
          <p className="text-ink-2">written {group.written}</p>
          <ul className="mt-2">
            {group.lines.map((line) => (
              <li
                key={line.id}
                className="grid grid-cols-[52px_minmax(0,1fr)] items-center gap-x-4 border-t border-line py-2 tablet:grid-cols-[52px_minmax(0,1fr)_minmax(0,1fr)]"
              >
                <ItemNut state={NUT[line.state]} size={44} />
                <p>{line.to}</p>
                <p className="max-tablet:col-start-2">
                  <b className={line.state === "given up" ? "text-stop-ink" : undefined}>{line.words}</b>
                  {line.error && <span className="block text-note text-ink-2">{line.error}</span>}
                </p>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </main>
  );
}
