// Prints "PASSED FAILED" from a vitest JSON report. Whatever is not a pass is a failure: a skipped test too, since here
// everything that tests need is installed, and a run that ended badly though no test of it failed.
import { readFileSync } from 'node:fs';

const [report, exitCode] = process.argv.slice(2);
const { numTotalTests, numPassedTests, testResults } = JSON.parse(readFileSync(report, 'utf8'));
const brokenFiles = testResults.filter(
  ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
);
const failed = numTotalTests - numPassedTests + brokenFiles.length;
const unexplained = failed === 0 && (exitCode !== '0' || numPassedTests === 0) ? 1 : 0;
process.stdout.write(`${numPassedTests} ${failed + unexplained}`);
