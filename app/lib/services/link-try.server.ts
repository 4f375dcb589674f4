// A try with a link counts against the network address that it comes from, as wrong when the link is over: whoever tries out links is
// stopped like whoever tries out passwords. A link that is good is never held up by what is typed with it.
import { write } from "#app/db/client.server";
import { addressNow, beginAttempt, succeeded, waitInWords } from "#app/lib/auth/throttle.server";
import { type Outcome, refuse } from "#app/lib/services/outcome";

export async function tryLink<T>(work: () => Promise<Outcome<T>>): Promise<Outcome<T>> {
  const address = addressNow();
  const attempt = await beginAttempt("address", address);
  if (!attempt.ok) return refuse(429, "too-often", `Too many wrong tries. Wait ${waitInWords(attempt.until)}, then try again.`);
  const outcome = await work();
  if (outcome.ok || outcome.code !== "link-over") await write((tx) => succeeded(tx, "address", address));
  return outcome;
}
