import { readFileSync } from 'node:fs';

/** Nothing counted yet. */
export const none = { passed: 0, failed: 0, skipped: 0 };

/** Adds up counts. */
export function add(...counts) {
	return counts.reduce(
		(sum, one) => ({
			passed: sum.passed + one.passed,
			failed: sum.failed + one.failed,
			skipped: sum.skipped + one.skipped
		}),
		none
	);
}

/**
 * The counts of a finished runner from its JSON report and exit code. A report that is missing, and an exit code that
 * the counted failures do not explain, is a crash: one failure more.
 */
export function countReport(file, read, code) {
	let counts;
	try {
		counts = read(JSON.parse(readFileSync(file, 'utf8')));
	} catch {
		return { ...none, failed: 1 };
	}
	return code !== 0 && counts.failed === 0 ? { ...counts, failed: 1 } : counts;
}

/** Vitest's JSON report. A file that fails without a failed test (it did not even load) counts as one. */
export function readVitest(report) {
	const counts = { ...none };
	for (const file of report.testResults) {
		const failed = file.assertionResults.filter(({ status }) => status === 'failed').length;
		counts.failed += failed === 0 && file.status === 'failed' ? 1 : failed;
		counts.passed += file.assertionResults.filter(({ status }) => status === 'passed').length;
		counts.skipped += file.assertionResults.filter(({ status }) => !['passed', 'failed'].includes(status)).length;
	}
	return counts;
}

/** Playwright's JSON report. Errors outside any test (a file that does not load) count as one each. */
export function readPlaywright(report) {
	const { expected, unexpected, flaky, skipped } = report.stats;
	return { passed: expected + flaky, failed: unexpected + report.errors.length, skipped };
}

/** The closing line. */
export function closingLine({ passed, failed, skipped }) {
	return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
