import { parseWithZod } from "@conform-to/zod/v4";
import { eq } from "drizzle-orm";
import { data, Form, redirect } from "react-router";
import { AccountPage } from "#app/components/account/AccountPage";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { Fitting } from "#app/components/ui/Fitting";
import { db } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { actorOf } from "#app/lib/auth/actor.server";
import { readForm } from "#app/lib/http/form.server";
import { MAIL_CHOICES, mailForm } from "#app/lib/schemas/account";
import { chooseMails } from "#app/lib/services/own-choices.server";
import { MAIL_WORDS } from "#app/lib/views/account";
import type { Route } from "./+types/_app.account.mail";

export const meta: Route.MetaFunction = () => [{ title: "Mails · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { userId, email } = actorOf(context);
  const [me] = await db().select({ mailOff: users.mailOff }).from(users).where(eq(users.id, userId));
  return { email, want: MAIL_CHOICES.filter((choice) => !me?.mailOff.includes(choice)) };
}

export async function action({ request, context }: Route.ActionArgs) {
  const chosen = parseWithZod(await readForm(request), { schema: mailForm });
  if (chosen.status !== "success") throw data("Choose from the mails that are listed.", { status: 400 });
  await chooseMails(actorOf(context).userId, chosen.value.want);
  return redirect("/account?mails", 303);
}

export default function Mails({ loaderData: { email, want } }: Route.ComponentProps) {
  return (
    <AccountPage title="Mails" state={`to ${email}`}>
      <section aria-labelledby="always" className="max-w-[62ch]">
        <h2 id="always" className="pb-1 text-h3">
          In any case
        </h2>
        <p>
          GO, no-go, HOLD and SCRUB of runs on which you hold a place: you may be standing at a propeller. And news about your account, such
          as a changed password.
        </p>
      </section>
      <Form method="post" className="flex max-w-[860px] flex-col items-start gap-4">
        <ChoiceGroup
          name="want"
          kind="checkbox"
          stacked
          label="And if you like"
          options={MAIL_CHOICES.map((value) => ({ value, ...MAIL_WORDS[value] }))}
          defaultValue={want}
        />
        <Fitting variant="outline">Send me these</Fitting>
      </Form>
    </AccountPage>
  );
}
