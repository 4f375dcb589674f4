// Every table, for Drizzle alone. Everybody else imports the noun's own file. Imports in this folder are relative:
// the migration generator does not know the project's import names.
export * from "./account-links";
export * from "./api-tokens";
export * from "./attempts";
export * from "./bench-inputs";
export * from "./commands";
export * from "./crib";
export * from "./events";
export * from "./exceedances";
export * from "./files";
export * from "./findings";
export * from "./gates";
export * from "./installs";
export * from "./invitations";
export * from "./items";
export * from "./leases";
export * from "./loose-ends";
export * from "./members";
export * from "./openings";
export * from "./outbox";
export * from "./proofs";
export * from "./rungs";
export * from "./runs";
export * from "./sessions";
export * from "./signatures";
export * from "./users";
export * from "./values";
