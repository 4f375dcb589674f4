// Apron (light), hangar (dark), or as the tablet says. The choice is kept in a cookie, so that it holds before signing in too.
import { z } from "zod";
import { env } from "#app/lib/env.server";

export const themeChoice = z.enum(["auto", "apron", "hangar"]);
export type Theme = z.infer<typeof themeChoice>;

export const themeCookie = (theme: Theme): string =>
  `theme=${theme}; Path=/; Max-Age=31536000; HttpOnly; SameSite=Lax${env.https ? "; Secure" : ""}`;

export function readTheme(request: Request): Theme {
  const value = /(?:^|;\s*)theme=(\w+)/.exec(request.headers.get("Cookie") ?? "")?.[1];
  return themeChoice.catch("auto").parse(value);
}
