// How a service's "no" leaves the server: the same code, sentence and blockers for a page and for a program.
import { data } from "react-router";
import type { Blocker } from "#app/lib/gates/result";
import type { Refusal } from "#app/lib/services/outcome";

export interface Refused {
  code: string;
  message: string;
  blockers: Blocker[];
}

const body = ({ code, message, blockers }: Refusal): Refused => ({ code, message, blockers });

/** For a page's action. `also` goes back to the form, such as what was typed. */
export const refused = <T extends object = Record<never, never>>(refusal: Refusal, also?: T) =>
  data({ refusal: body(refusal), ...(also as T) }, { status: refusal.status });

/** For a program. */
export const refusedJson = (refusal: Refusal): Response => Response.json(body(refusal), { status: refusal.status });
