/** Version of the rules in this folder. Every signature names it; a change of a rule raises it, and the server then evaluates every install anew,
 * writes it into each record and holds every GO.
 * 2: a sheet must have computed with the install's own values; grounding clears to 0; a walk-round looks at every planned run and at
 * rungs set back; gates new on the board are asked of runs planned before; answers before a start taken back do not count; an
 * opening that a second person saw to have disturbed nothing does not count; a tool found out of tolerance may be doubtful since earlier. */
export const RULES_VERSION = "2";
