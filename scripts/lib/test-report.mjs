import { existsSync } from "node:fs";
import { readJsonObject } from "./files.mjs";

/** @typedef {{ passed: number, failed: number, notes: string[] }} Count */

/**
 * A part that gave no figures at all counts as one failure, never as silence.
 * @param {string} note
 * @returns {Count}
 */
export const failedPart = (note) => ({ passed: 0, failed: 1, notes: [note] });

/**
 * @param {boolean} ok
 * @param {string} name
 * @returns {Count}
 */
export function countCheck(ok, name) {
  return ok ? { passed: 1, failed: 0, notes: [] } : failedPart(`${name} failed.`);
}

/**
 * Counts vitest's JSON report. A file that could not be loaded, a skipped test and an unhandled error are failures.
 * @param {Record<string, unknown> | null} report
 * @param {{ name: string, exitedWell: boolean }} part
 * @returns {Count}
 */
export function countVitest(report, { name, exitedWell }) {
  if (report === null) return failedPart(`${name} ended without a report.`);
  const files = Array.isArray(report.testResults) ? report.testResults : [];
  const broken = files.filter((file) => file.status === "failed" && !file.assertionResults.some((/** @type {{ status: string }} */ test) => test.status === "failed"));
  const skipped = numberOf(report.numPendingTests) + numberOf(report.numTodoTests);
  const count = {
    passed: numberOf(report.numPassedTests),
    failed: numberOf(report.numFailedTests) + broken.length + skipped,
    notes: [
      ...broken.map((file) => `${file.name} did not load.`),
      ...(skipped > 0 ? [`${name}: ${skipped} tests were skipped; skipping counts as failing.`] : []),
    ],
  };
  return withExit(count, { name, exitedWell });
}

/**
 * Counts playwright's JSON report.
 * @param {Record<string, unknown> | null} report
 * @param {{ name: string, exitedWell: boolean }} part
 * @returns {Count}
 */
export function countPlaywright(report, { name, exitedWell }) {
  const stats = report?.stats;
  if (typeof stats !== "object" || stats === null) return failedPart(`${name} ended without a report.`);
  const { expected, unexpected, flaky, skipped } = { expected: 0, unexpected: 0, flaky: 0, skipped: 0, ...stats };
  const errors = Array.isArray(report?.errors) ? report.errors.length : 0;
  const count = {
    passed: numberOf(expected),
    failed: numberOf(unexpected) + numberOf(flaky) + numberOf(skipped) + errors,
    notes: numberOf(skipped) > 0 ? [`${name}: ${skipped} tests were skipped; skipping counts as failing.`] : [],
  };
  return withExit(count, { name, exitedWell });
}

/**
 * @param {readonly Count[]} counts
 * @returns {Count}
 */
export function sumCounts(counts) {
  return {
    passed: counts.reduce((sum, count) => sum + count.passed, 0),
    failed: counts.reduce((sum, count) => sum + count.failed, 0),
    notes: counts.flatMap((count) => count.notes),
  };
}

/**
 * @param {string} path
 * @returns {Record<string, unknown> | null}
 */
export function readReport(path) {
  return existsSync(path) ? readJsonObject(path) : null;
}

/**
 * @param {Count} count
 * @param {{ name: string, exitedWell: boolean }} part
 */
function withExit(count, { name, exitedWell }) {
  if (count.passed + count.failed === 0) return failedPart(`${name} ran no tests.`);
  if (!exitedWell && count.failed === 0) return { ...count, failed: 1, notes: [...count.notes, `${name} broke off.`] };
  return count;
}

/** @param {unknown} value */
function numberOf(value) {
  return typeof value === "number" ? value : 0;
}
