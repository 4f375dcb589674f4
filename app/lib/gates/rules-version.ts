/** Version of the rules in this folder. Every signature names it; a change of a rule raises it, and the server then evaluates every install anew. */
export const RULES_VERSION = "1";
