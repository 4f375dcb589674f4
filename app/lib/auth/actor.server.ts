// The person behind a request. Middleware puts them into the request's context; loaders, actions and services take them from there.
import { createContext, type RouterContextProvider } from "react-router";
import { type User, users } from "#app/db/schema/users";

export type Actor = Pick<User, "name" | "email" | "units" | "theme" | "isAdmin"> & { userId: string; sessionId: string };

/** What is read of a person, whichever way they came in. */
export const actorColumns = {
  userId: users.id,
  name: users.name,
  email: users.email,
  units: users.units,
  theme: users.theme,
  isAdmin: users.isAdmin,
};

export const actorContext = createContext<Actor | null>(null);

/** The signed-in person. Only for routes behind `requireUser`: anywhere else it throws. */
export function actorOf(context: Readonly<RouterContextProvider>): Actor {
  const actor = context.get(actorContext);
  if (!actor) throw new Error("This route needs a signed-in person, but no guard stands before it");
  return actor;
}
