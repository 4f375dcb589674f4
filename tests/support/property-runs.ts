/** How many random boards a property looks at. PROPERTY_SHARE (0.1 = a tenth) shortens it where the same tests run again and again. */
export const runsOf = (wanted: number): { numRuns: number } => ({
  numRuns: Math.max(10, Math.round(wanted * Number(process.env.PROPERTY_SHARE ?? 1))),
});
