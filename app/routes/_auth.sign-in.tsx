import { getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect, useNavigation } from "react-router";
import type { z } from "zod";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { PasswordInput } from "#app/components/forms/PasswordInput";
import { TextInput } from "#app/components/forms/TextInput";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { authenticator, SignInRefused } from "#app/lib/auth/authenticator.server";
import { readSession } from "#app/lib/auth/session.server";
import { readForm } from "#app/lib/http/form.server";
import { returnPath } from "#app/lib/http/return-path";
import { themeCookie } from "#app/lib/http/theme.server";
import { signInForm } from "#app/lib/schemas/sign-in";
import { isEmpty } from "#app/lib/services/first-person.server";
import type { Route } from "./+types/_auth.sign-in";

export const meta: Route.MetaFunction = () => [{ title: "Sign in · Bladecount" }];

export async function loader({ request, url }: Route.LoaderArgs) {
  const to = returnPath(url.searchParams.get("to"));
  if (await readSession(request)) throw redirect(to);
  return { to, wasReset: url.searchParams.has("reset"), empty: await isEmpty() };
}

export async function action({ request }: Route.ActionArgs) {
  const submission = parseWithZod(await readForm(request.clone()), { schema: signInForm });
  const refuse = (status: number, formErrors?: string[]) =>
    data({ result: submission.reply({ formErrors, hideFields: ["password"] }) }, { status });
  if (submission.status !== "success") return refuse(400);
  try {
    const { cookie, theme } = await authenticator.authenticate("password", request);
    const headers = new Headers({ "Set-Cookie": cookie });
    if (theme !== "auto") headers.append("Set-Cookie", themeCookie(theme));
    return redirect(returnPath(submission.value.to), { status: 303, headers });
  } catch (error) {
    if (error instanceof SignInRefused) return refuse(error.status, [error.message]);
    throw error;
  }
}

export default function SignIn({ loaderData, actionData }: Route.ComponentProps) {
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm<z.input<typeof signInForm>>({
    lastResult: busy ? undefined : actionData?.result,
    defaultValue: { email: "" },
  });
  const wrong = [form, fields.email, fields.password].flatMap((field) =>
    (field.errors ?? []).map((message) => ({ field: field === form ? null : field.id, message: String(message) })),
  );
  return (
    <>
      <h1 className="text-h1 leading-tight font-[680] tracking-[-0.032em]">Bladecount</h1>
      <div className="-mx-4 my-3 h-6 border-y-2 border-pipe bg-bore tablet:-mx-6 wide:-mx-12" aria-hidden="true">
        <div className="h-full w-4 bg-flow tablet:w-6 wide:w-12" />
      </div>
      <p className="text-lead">Is it ready to run, and what stops it.</p>
      {loaderData.wasReset && !actionData && (
        <Notice kind="done" title="Your new password is set." role="status">
          You were signed out everywhere. Sign in with it.
        </Notice>
      )}
      {loaderData.empty && (
        <Notice kind="plain" title="Nobody has an account here yet.">
          The server printed a link when it started. Open it to make the first account.
        </Notice>
      )}
      <Form method="post" {...getFormProps(form)} aria-label="Sign in" className="mt-4 flex flex-col gap-4">
        <ErrorSummary errors={wrong} title="You are not signed in" />
        <input type="hidden" name="to" value={loaderData.to} />
        <TextInput
          key={fields.email.key}
          id={fields.email.id}
          name="email"
          type="email"
          label="E-mail"
          autoComplete="username"
          defaultValue={fields.email.initialValue}
          errors={fields.email.errors}
          required
        />
        <PasswordInput
          id={fields.password.id}
          name="password"
          label="Password"
          autoComplete="current-password"
          errors={fields.password.errors}
          required
        />
        <Fitting size="act" note="this browser stays signed in for 14 days" busy={busy}>
          Sign in
        </Fitting>
      </Form>
      <p className="mt-2">
        <Anchor href="/forgot" className="inline-block py-3 font-semibold text-fitting-ink">
          Forgot the password?
        </Anchor>
      </p>
      <p className="text-note text-ink-2">
        You join an install by an invitation of its lead, which comes by mail. Your signing PIN is asked for later, each time that you sign.
        This product never replaces the maker’s manual, your authority’s rules or a licensed person’s judgement.
      </p>
    </>
  );
}
