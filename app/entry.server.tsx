// Pages are rendered whole, then sent: every one is complete when its loaders are, and a finished page has a length, a
// status that is true, and compresses as one piece.
import { Writable } from "node:stream";
import { renderToPipeableStream } from "react-dom/server";
import type { EntryContext, HandleErrorFunction, RouterContextProvider } from "react-router";
import { isRouteErrorResponse, ServerRouter } from "react-router";
import { TraceContext } from "#app/components/ui/trace";
import { migrateDatabase } from "#app/db/migrate.server";
import { env } from "#app/lib/env.server";
import { setSecurityHeaders } from "#app/lib/http/headers.server";
import { currentRequest, newRequestFacts, requestContext } from "#app/lib/http/request.server";
import { log } from "#app/lib/log.server";
import { startMailWorker } from "#app/lib/mail/worker.server";
import { startBoardClock } from "#app/lib/services/board-clock.server";
import { firstPersonLink } from "#app/lib/services/first-person.server";

export { createRequestHandler, RouterContextProvider } from "react-router";
// For the server in front, which runs outside this bundle and must share its modules.
export { env } from "#app/lib/env.server";
export { setSecurityHeaders } from "#app/lib/http/headers.server";
export { newRequestFacts, requestContext } from "#app/lib/http/request.server";
export { log } from "#app/lib/log.server";

const renderLimit = 10_000;

export default async function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  entryContext: EntryContext,
  context: RouterContextProvider,
): Promise<Response> {
  const facts = context.get(requestContext) ?? newRequestFacts("unknown");
  headers.set("Content-Type", "text/html; charset=utf-8");
  setSecurityHeaders(headers, facts.nonce, { development: env.mode === "development", https: env.https });
  if (request.method === "HEAD") return new Response(null, { status, headers });
  const page = await renderPage(
    <TraceContext value={facts.traceId}>
      <ServerRouter context={entryContext} url={request.url} nonce={facts.nonce} />
    </TraceContext>,
    facts.nonce,
  );
  return new Response(page, { status, headers });
}

function renderPage(page: React.ReactNode, nonce: string): Promise<Buffer<ArrayBuffer>> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    const sink = new Writable({
      write(chunk: Buffer, _encoding, done) {
        chunks.push(chunk);
        done();
      },
      final(done) {
        resolve(Buffer.concat(chunks));
        done();
      },
    });
    const timer = setTimeout(() => abort(new Error(`A page took more than ${renderLimit} ms to render`)), renderLimit);
    const { pipe, abort } = renderToPipeableStream(page, {
      nonce,
      onAllReady() {
        clearTimeout(timer);
        pipe(sink);
      },
      onShellError(error) {
        clearTimeout(timer);
        reject(error);
      },
      onError(error) {
        log.error({ err: error, trace: currentRequest()?.traceId }, "a part of a page could not be rendered");
      },
    });
  });
}

export const handleError: HandleErrorFunction = (error, { request, context }) => {
  if (request.signal.aborted) return;
  // Refusals that a route threw on purpose (404, 403) are answers, not faults.
  if (error instanceof Response || (isRouteErrorResponse(error) && error.status < 500)) return;
  const facts = context.get(requestContext) ?? currentRequest();
  log.error({ err: error, trace: facts?.traceId, method: request.method, path: new URL(request.url).pathname }, "a request failed");
};

/** What must be done before the first request: bring the database up to date, start sending mail. Resolves to the way to stop. */
export async function boot(): Promise<() => Promise<void>> {
  await migrateDatabase().catch((error: unknown) => {
    const reason = error instanceof Error ? error.message : String(error);
    throw new Error(
      `The database ${env.databaseUrl} cannot be used: ${reason}. See that its folder can be written and has room; if the file is damaged, restore a backup.`,
    );
  });
  const first = await firstPersonLink();
  // On the console and not in the log: logs are kept and copied, and this opens the instance.
  if (first)
    process.stderr.write(`\nNobody has an account here yet. Open this link once to make the first one, its administrator:\n${first}\n\n`);
  const mail = startMailWorker();
  const clock = startBoardClock();
  return async () => {
    await Promise.all([clock.stop(), mail.stop()]);
  };
}

// The development server has nobody in front to call boot; it loads this module anew at each edit, and boots once.
const booted = globalThis as typeof globalThis & { bladecountBooted?: Promise<unknown> };
if (import.meta.env.DEV) booted.bladecountBooted ??= boot().catch((error: unknown) => log.fatal({ err: error }, "cannot start"));
