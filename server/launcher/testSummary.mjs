import { readFileSync } from 'node:fs';

function readReport(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/**
 * Counts what vitest reported. A file that could not be loaded counts as one failure, and so does an error
 * outside all tests, which vitest tells only by its exit code.
 * @param file vitest's JSON report
 * @returns `{ line, remarks, ok }`, the line being `N passed, N failed` with skipped ones when there are any
 */
export function summarise(file, exitCode) {
  const report = readReport(file);
  if (!report) {
    return {
      line: '0 passed, 1 failed',
      remarks: [`vitest left no report (code ${exitCode}).`],
      ok: false,
    };
  }
  const broken = report.testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && assertionResults.every((one) => one.status !== 'failed'),
  );
  const remarks = broken.map(
    ({ name, message }) => `Could not run ${name}: ${message.split('\n')[0]}`,
  );
  const passed = report.numPassedTests;
  const skipped = report.numPendingTests + (report.numTodoTests ?? 0);
  let failed = report.numFailedTests + broken.length;
  if (passed + failed === 0) {
    failed = 1;
    remarks.push('No test was run.');
  }
  if (failed === 0 && exitCode !== 0) {
    failed = 1;
    remarks.push('All tests passed, but vitest saw an error outside them.');
  }
  const line = `${passed} passed, ${failed} failed${skipped ? `, ${skipped} skipped` : ''}`;
  return { line, remarks, ok: failed === 0 };
}
