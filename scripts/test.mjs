// Everything that must hold: types, lint, unit to service tests, build, browser tests. Installs what is missing first.
// The last line says how many passed and failed, counted from the tools' own reports.
import { existsSync, readFileSync, rmSync } from "node:fs";
import { findBrowser, installBrowser, installPackages, run, tool } from "./prepare.mjs";

const reports = { vitest: "test-results/vitest.json", playwright: "test-results/playwright.json" };
let passed = 0;
let failed = 0;

/** One check that counts as one test. */
function check(name, ok) {
  console.log(`${ok ? "passed" : "FAILED"}: ${name}`);
  if (ok) passed++;
  else failed++;
  return ok;
}

/** Adds what a tool's report counted. A tool that failed without a failed test, or left no report, counts as one failed. */
function count(name, ok, file, read) {
  const tally = existsSync(file) ? read(JSON.parse(readFileSync(file, "utf8"))) : { passed: 0, failed: 0, skipped: 0 };
  if (!ok && tally.failed === 0) tally.failed = 1;
  passed += tally.passed;
  failed += tally.failed;
  console.log(`${name}: ${tally.passed} passed, ${tally.failed} failed, ${tally.skipped} skipped`);
}

const readVitest = (report) => ({
  passed: report.numPassedTests,
  // A file that could not be loaded has no tests to fail.
  failed: report.numFailedTests + report.testResults.filter((f) => f.status === "failed" && f.assertionResults.length === 0).length,
  skipped: report.numPendingTests + report.numTodoTests,
});

const readPlaywright = ({ stats, errors }) => ({
  passed: stats.expected,
  failed: stats.unexpected + stats.flaky + errors.length,
  skipped: stats.skipped,
});

try {
  rmSync("test-results", { recursive: true, force: true });
  installPackages();
  check("types", run("npm", ["run", "--silent", "typecheck"]));
  check("lint", run("npm", ["run", "--silent", "lint"]));
  const unit = run(tool("vitest"), ["run", "--reporter=default", "--reporter=json", `--outputFile.json=${reports.vitest}`]);
  count("unit, standards, route and service tests", unit, reports.vitest, readVitest);
  if (run(tool("react-router"), ["build"])) {
    installBrowser();
    const browser = run(tool("playwright"), ["test", "--reporter=list,json"], {
      PLAYWRIGHT_JSON_OUTPUT_NAME: reports.playwright,
      CHROMIUM: findBrowser(),
    });
    count("browser tests", browser, reports.playwright, readPlaywright);
  } else check("build, and with it every browser test", false);
} catch (error) {
  check(`a tool could not be run: ${error.message}`, false);
}

console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 && passed > 0 ? 0 : 1);
