import type { Requirement } from '@shared/contract';

/** A finding on the wording of a statement; blocking ones stop submission, none of them edits the text. */
export interface WordingFinding {
  readonly code: string;
  readonly blocks: boolean;
  readonly message: string;
}

/** Findings on a requirement's statement: one "shall", no "must", a number in the limit. */
export function wordingFindings(requirement: Pick<Requirement, 'text' | 'limit'>): readonly WordingFinding[] {
  const findings: WordingFinding[] = [];
  const shalls = requirement.text.match(/\bshall\b/gi)?.length ?? 0;
  if (shalls === 0)
    findings.push({
      code: 'no-shall',
      blocks: true,
      message: 'a requirement states one thing with “shall”; this statement has none.',
    });
  if (shalls > 1)
    findings.push({
      code: 'many-shalls',
      blocks: true,
      message: `a requirement states one thing with one “shall”; this statement has ${shalls}. Split it.`,
    });
  if (/\bmust\b/i.test(requirement.text))
    findings.push({ code: 'must', blocks: false, message: 'use “shall” for what is required; “must” is ambiguous.' });
  if (!requirement.limit)
    findings.push({
      code: 'no-limit',
      blocks: false,
      message: 'no limit is stated: only the finding of a person can decide this requirement.',
    });
  return findings;
}

/** The findings that stop submission. */
export function blockingFindings(requirement: Pick<Requirement, 'text' | 'limit'>): readonly WordingFinding[] {
  return wordingFindings(requirement).filter((finding) => finding.blocks);
}
