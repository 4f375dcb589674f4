// What every request passes, before any route: facts for the log, the security headers of the answer, the origin check of writes.
import { data, type MiddlewareFunction } from "react-router";
import { env } from "#app/lib/env.server";
import { setSecurityHeaders } from "#app/lib/http/headers.server";
import { refuseForeignWrite } from "#app/lib/http/origin";
import { newRequestFacts, requestContext, withRequest } from "#app/lib/http/request.server";
import { log } from "#app/lib/log.server";

/** Gives the request its facts, when the server in front has not, and its answer the security headers. */
export const everyRequest: MiddlewareFunction<Response> = async ({ context }, next) => {
  const facts = context.get(requestContext) ?? newRequestFacts("unknown");
  context.set(requestContext, facts);
  const response = await withRequest(facts, next);
  setSecurityHeaders(response.headers, facts.nonce, { development: env.mode === "development", https: env.https });
  // Page scripts cannot see the status of a data request that failed: this is how the error page learns its number.
  if (response.status >= 500) response.headers.append("Set-Cookie", `trace=${facts.traceId}; Path=/; Max-Age=60; SameSite=Lax`);
  return response;
};

export const ownOriginOnly: MiddlewareFunction<Response> = async ({ request, context }, next) => {
  const refusal = refuseForeignWrite(request);
  if (!refusal) return next();
  log.warn({ trace: context.get(requestContext)?.traceId, method: request.method }, "a write from another site was refused");
  throw data(refusal, { status: 403 });
};
