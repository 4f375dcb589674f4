// Signing in with e-mail and password. The answer and the time are the same whether or not the account exists.
import { and, eq, isNull } from "drizzle-orm";
import { Authenticator } from "remix-auth";
import { FormStrategy } from "remix-auth-form";
import { db, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { matches, matchesNobody } from "#app/lib/auth/hash.server";
import { startSession } from "#app/lib/auth/session.server";
import { beginAttempt, succeeded, waitInWords } from "#app/lib/auth/throttle.server";
import { currentRequest } from "#app/lib/http/request.server";
import { log } from "#app/lib/log.server";
import { signInForm } from "#app/lib/schemas/sign-in";

/** Why nobody was signed in: a sentence for the person, and the status of the answer. */
export class SignInRefused extends Error {
  constructor(
    message: string,
    readonly status: 400 | 429,
  ) {
    super(message);
  }
}

export type SignedIn = { userId: string; theme: "auto" | "apron" | "hangar"; cookie: string };

export const authenticator = new Authenticator<SignedIn>();

authenticator.use(
  new FormStrategy(async ({ form, request }) => {
    const entered = signInForm.safeParse(Object.fromEntries(form));
    if (!entered.success) throw new SignInRefused(entered.error.issues[0]?.message ?? "Enter your e-mail address and password.", 400);
    return signIn(entered.data, { address: currentRequest()?.address ?? "unknown", userAgent: request.headers.get("User-Agent") });
  }),
  "password",
);

async function signIn(
  { email, password }: { email: string; password: string },
  visitor: { address: string; userAgent: string | null },
): Promise<SignedIn> {
  for (const [kind, value] of [["address", visitor.address] as const, ["account", email] as const]) {
    const attempt = await beginAttempt(kind, value);
    if (!attempt.ok) throw new SignInRefused(`Too many wrong tries. Wait ${waitInWords(attempt.until)}, then try again.`, 429);
  }
  const [person] = await db()
    .select({ userId: users.id, theme: users.theme, passwordHash: users.passwordHash })
    .from(users)
    .where(and(eq(users.email, email), isNull(users.disabledAt)));
  const right = person ? await matches(password, person.passwordHash) : await matchesNobody(password);
  if (!person || !right) {
    log.warn({ user: person?.userId, trace: currentRequest()?.traceId }, "a sign-in was refused");
    throw new SignInRefused(
      "This e-mail address and password do not belong together. Check both. If the password is lost, have a link sent to you: “Forgot the password?” below.",
      400,
    );
  }
  const cookie = await write(async (tx) => {
    await succeeded(tx, "account", email);
    await succeeded(tx, "address", visitor.address);
    return startSession(tx, person.userId, visitor.userAgent);
  });
  log.info({ user: person.userId, trace: currentRequest()?.traceId }, "signed in");
  return { userId: person.userId, theme: person.theme, cookie };
}
