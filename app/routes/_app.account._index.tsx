import { eq } from "drizzle-orm";
import { data, Form, redirect } from "react-router";
import { z } from "zod";
import { AccountRow } from "#app/components/account/AccountRow";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { apiTokens } from "#app/db/schema/api-tokens";
import { users } from "#app/db/schema/users";
import { actorOf } from "#app/lib/auth/actor.server";
import { sessionsOf } from "#app/lib/auth/session.server";
import { count } from "#app/lib/gates/who";
import { readForm } from "#app/lib/http/form.server";
import { MAIL_CHOICES } from "#app/lib/schemas/account";
import { setUnits } from "#app/lib/services/set-units.server";
import type { Route } from "./+types/_app.account._index";

const choice = z.object({ units: z.enum(["si", "us"]) });

export const meta: Route.MetaFunction = () => [{ title: "Account · Bladecount" }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const { userId, name, email, units, theme } = actorOf(context);
  const [me] = await db().select({ pinHash: users.pinHash, mailOff: users.mailOff }).from(users).where(eq(users.id, userId));
  const sessions = (await sessionsOf(userId)).length;
  const tokens = await db().$count(apiTokens, eq(apiTokens.userId, userId));
  const changed = ["password", "pin", "address", "mails"].find((what) => url.searchParams.has(what)) ?? "";
  const wanted = MAIL_CHOICES.length - (me?.mailOff.length ?? 0);
  return { name, email, units, theme: theme ?? "auto", hasPin: Boolean(me?.pinHash), sessions, tokens, changed, wanted };
}

export async function action({ request, context }: Route.ActionArgs) {
  const chosen = choice.safeParse(Object.fromEntries(await readForm(request)));
  if (!chosen.success) throw data("Choose SI or US customary units.", { status: 400 });
  await setUnits(actorOf(context).userId, chosen.data.units);
  return redirect("/account", { status: 303 });
}

export default function Account({ loaderData }: Route.ComponentProps) {
  const { name, email, units, theme, hasPin, sessions, tokens, changed, wanted } = loaderData;
  const says = CHANGED[changed];
  const go = (href: string, label: string, act: string) => (
    <Fitting href={`/account/${href}`} label={label}>
      {act}
    </Fitting>
  );
  return (
    <main id="main">
      <TitlePipe title={name} state={email} />
      <div className="flex flex-col gap-8 px-4 py-5 tablet:px-6">
        {says && (
          <Notice kind="done" title={says.title} role="status">
            {says.says}
          </Notice>
        )}
        {!hasPin && (
          <Notice kind="refused" title="You have no signing PIN yet." action={go("pin", "Set the signing PIN", "Set it")}>
            Without one you cannot sign.
          </Notice>
        )}
        <section aria-labelledby="who" className="max-w-[860px]">
          <h2 id="who" className="border-b-2 border-ink pb-2 text-h3">
            Who you are here
          </h2>
          <ul>
            <AccountRow title="Mail address" acts={go("address", "Change the mail address", "Change")}>
              {email}: you sign in with it, and mail goes there
            </AccountRow>
            <AccountRow title="Password" acts={go("password", "Change the password", "Change")}>
              changing it signs you out everywhere else
            </AccountRow>
            <AccountRow title="Signing PIN" acts={go("pin", `${hasPin ? "Change" : "Set"} the signing PIN`, hasPin ? "Change" : "Set")}>
              {hasPin ? "set; asked for each time that you sign" : "not set: you cannot sign"}
            </AccountRow>
            <AccountRow title="Where you are signed in" acts={go("sessions", "See where you are signed in", "See")}>
              {count(sessions, "browser")}, this one counted
            </AccountRow>
            <AccountRow title="Mails" acts={go("mail", "Choose mails", "Choose")}>
              {wanted === MAIL_CHOICES.length
                ? "all of them"
                : `those about your own places, and ${wanted} of ${MAIL_CHOICES.length} other kinds`}
            </AccountRow>
            <AccountRow title="API tokens" acts={go("tokens", "See the API tokens", "See")}>
              {tokens ? `${count(tokens, "token")} for programs of yours` : "none: no program asks in your name"}
            </AccountRow>
          </ul>
        </section>
        <Form method="post" className="flex flex-col items-start gap-4">
          <ChoiceGroup
            name="units"
            label="Units"
            hint="Values are kept in SI; this is how you see and enter them."
            options={UNITS}
            defaultValue={units}
          />
          <Fitting variant="outline">Use these units</Fitting>
        </Form>
        <Form method="post" action="/theme" className="flex flex-col items-start gap-4">
          <input type="hidden" name="to" value="/account" />
          <ChoiceGroup
            name="theme"
            label="Light"
            hint="Apron reads best outdoors, hangar in a dark corner."
            options={THEMES}
            defaultValue={theme}
          />
          <Fitting variant="outline">Use this light</Fitting>
        </Form>
        <Form method="post" action="/sign-out">
          <Fitting variant="outline">Sign out on this device</Fitting>
        </Form>
      </div>
    </main>
  );
}

const CHANGED: Record<string, { title: string; says: string }> = {
  password: { title: "Your password is changed.", says: "Every other browser was signed out. A mail tells you of it." },
  pin: { title: "Your signing PIN is set.", says: "It counts from the next signature on. A mail tells you of it." },
  address: { title: "Your mail address is changed.", says: "You sign in with it from now on. Both addresses were told." },
  mails: { title: "Your choice of mails is kept.", says: "Mails about runs on which you hold a place come in any case." },
};
const UNITS = [
  { value: "si", label: "SI", note: "N·m, kPa, °C, L" },
  { value: "us", label: "US customary", note: "lbf·in, psi, °F, US gal" },
];
const THEMES = [
  { value: "apron", label: "Apron, light" },
  { value: "hangar", label: "Hangar, dark" },
  { value: "auto", label: "As the device says" },
];
