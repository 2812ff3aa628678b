import type { Requirement } from '@shared/contract';
import { outputNode } from '../model';
import type { Study } from '../study';

/** Requirements in force by the output node that is linked to them. */
export function requirementsByNode(study: Study): Map<string, Requirement[]> {
  const verified = new Map<string, Requirement[]>();
  for (const { analysisId, output, requirementId } of study.all('verification')) {
    const requirement = study.get('requirement', requirementId);
    if (!analysisId || !output || !requirement || requirement.state === 'withdrawn') continue;
    const node = outputNode(analysisId, output);
    verified.set(node, [...(verified.get(node) ?? []), requirement]);
  }
  return verified;
}
