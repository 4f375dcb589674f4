import { data, Form, redirect } from "react-router";
import { z } from "zod";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { Fitting } from "#app/components/ui/Fitting";
import { Strip } from "#app/components/ui/Strip";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { actorOf } from "#app/lib/auth/actor.server";
import { readForm } from "#app/lib/http/form.server";
import { setUnits } from "#app/lib/services/set-units.server";
import type { Route } from "./+types/_app.account";

const choice = z.object({ units: z.enum(["si", "us"]) });

export const meta = () => [{ title: "Account · Bladecount" }];

export function loader({ context }: Route.LoaderArgs) {
  const { name, email, units, theme } = actorOf(context);
  return { name, email, units, theme: theme ?? "auto" };
}

export async function action({ request, context }: Route.ActionArgs) {
  const chosen = choice.safeParse(Object.fromEntries(await readForm(request)));
  if (!chosen.success) throw data("Choose SI or US customary units.", { status: 400 });
  await setUnits(actorOf(context).userId, chosen.data.units);
  return redirect("/account", { status: 303 });
}

export default function Account({ loaderData }: Route.ComponentProps) {
  const { name, email, units, theme } = loaderData;
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={links} person={name} />
      <main id="main">
        <TitlePipe title={name} state={email} />
        <div className="flex max-w-[760px] flex-col gap-8 p-6">
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
    </div>
  );
}

const links = [
  { label: "Hangar", href: "/hangar" },
  { label: "New install", href: "/installs/new" },
  { label: "Account", href: "/account", current: true },
];
const UNITS = [
  { value: "si", label: "SI", note: "N·m, kPa, °C, L" },
  { value: "us", label: "US customary", note: "lbf·in, psi, °F, US gal" },
];
const THEMES = [
  { value: "apron", label: "Apron, light" },
  { value: "hangar", label: "Hangar, dark" },
  { value: "auto", label: "As the device says" },
];
