// `npm run mutate`: small faults are put into the rules one by one, and the tests must notice. Words of sentences are left out: they are
// read, not tested letter by letter. Slow; `npm run mutate -- --mutate app/lib/gates/proofs.ts` looks at one file.
/** @type {import('@stryker-mutator/api/core').PartialStrykerOptions} */
export default {
  testRunner: "vitest",
  vitest: { configFile: "vitest.mutate.config.ts", related: false },
  mutate: ["app/lib/gates/**/*.ts", "app/lib/record/**/*.ts"],
  mutator: { excludedMutations: ["StringLiteral"] },
  coverageAnalysis: "perTest",
  ignoreStatic: true,
  reporters: ["clear-text", "progress-append-only", "json"],
  clearTextReporter: { logTests: false, allowColor: false, reportTests: false },
  jsonReporter: { fileName: "node_modules/.cache/mutation/report.json" },
  ignorePatterns: ["test-results", "build", "data", "public", "fixtures"],
  tempDirName: "node_modules/.cache/mutation/sandbox",
  incremental: true,
  incrementalFile: "node_modules/.cache/mutation/incremental.json",
  concurrency: 1,
  timeoutMS: 20_000,
};
