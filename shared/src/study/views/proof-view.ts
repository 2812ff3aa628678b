import type { Analysis, ProofLine, Requirement, RequirementSheet, Verification } from '@shared/contract';
import { methodOf } from '../analysis-ports';
import { comparisonOf } from './comparison';
import { ownProofLines, proofLines } from './proof-lines';
import { chainBehind } from './proof-sources';
import { provenOf, verdictView, type ProofSource } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** What a requirement's sheet says about how its verdict comes about. */
export type ProofView = Pick<RequirementSheet, 'proof' | 'comparison' | 'proofNote' | 'cautions'>;

/** The analysis output that decides a requirement, if an analysis does. */
export function decidingOutput(
  source: ProofSource,
  requirement: Requirement,
): { readonly verification: Verification; readonly analysis: Analysis; readonly output: string } | null {
  const { study } = source.proof;
  const { verificationId } = provenOf(source, requirement.id);
  const verification = verificationId ? study.get('verification', verificationId) : undefined;
  if (!verification || verification.finding || !verification.analysisId || !verification.output) return null;
  const analysis = study.get('analysis', verification.analysisId);
  return analysis ? { verification, analysis, output: verification.output } : null;
}

/** The proof behind a requirement's verdict: numbered lines, the comparison, who stands for it, and its cautions. */
export function proofView(context: ViewContext, requirement: Requirement): ProofView {
  const deciding = decidingOutput(context, requirement);
  const verdict = verdictView(context, requirement);
  if (!deciding) return { proof: [], comparison: null, proofNote: sentence(verdict.reason), cautions: [] };
  const { analysis, output } = deciding;
  const proof: ProofLine[] = proofLines(context.proof, analysis, [output]);
  const cautions = chainBehind(context.proof, analysis, [output]).flatMap(
    (step) => methodOf(step.analysis)?.cautions ?? [],
  );
  return {
    proof,
    comparison: comparisonOf(requirement, verdict),
    proofNote: noteOn(context, analysis, verdict.basis),
    cautions: [...new Set(cautions)],
  };
}

/** The proof lines of one analysis on its own: all of its outputs, without the analyses that feed it. */
export function analysisProof(source: ProofSource, analysis: Analysis): ProofLine[] {
  return ownProofLines(source.proof, analysis);
}

function noteOn(context: ViewContext, analysis: Analysis, basis: 'predicted' | 'demonstrated' | null): string {
  const method = methodOf(analysis);
  const parts = [`Analysis ${analysis.key} “${analysis.name}”`];
  if (method) parts.push(`${method.name} (${method.reference.replace(/\.$/, '')})`);
  parts.push(
    analysis.check
      ? `checked by ${personRef(context, analysis.check.personId).name} on ${analysis.check.at.slice(0, 10)}`
      : 'not checked yet',
  );
  const predicted = basis === 'predicted' ? ' Predicted by analysis.' : '';
  return `${parts.join(', ')}.${predicted} Concept-level estimate: not for operational or safety decisions.`;
}

function sentence(text: string): string {
  if (!text) return '';
  const start = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(start) ? start : `${start}.`;
}
