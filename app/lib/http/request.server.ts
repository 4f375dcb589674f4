// What is known of the request being answered: a trace id for log and error page, the page's nonce, the visitor's address.
// It travels in the router's context, and beside it for code that is handed neither request nor context.
import { AsyncLocalStorage } from "node:async_hooks";
import { createContext } from "react-router";
import { newToken, newTraceId } from "#app/lib/ids";

export type RequestFacts = { traceId: string; nonce: string; address: string };

export const requestContext = createContext<RequestFacts | null>(null);

const running = new AsyncLocalStorage<RequestFacts>();

/** Facts of a request that just came in. `address` is the visitor's network address as the server saw it. */
export const newRequestFacts = (address: string): RequestFacts => ({ traceId: newTraceId(), nonce: newToken(), address });

/** Runs `work` so that `currentRequest()` finds `facts` in everything that it starts. */
export const withRequest = <T>(facts: RequestFacts, work: () => T): T => running.run(facts, work);

export const currentRequest = (): RequestFacts | undefined => running.getStore();
