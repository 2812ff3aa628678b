import type { CommandOf, Verification } from '@shared/contract';
import { describeDimension } from '@shared/units';
import { isTemperature, knownDimension, outputsOf, temperatureInWords } from '../analysis-ports';
import {
  type Apply,
  type EditContext,
  freshId,
  given,
  referred,
  refuseControlled,
  revised,
  target,
} from '../edit-context';
import { a } from '../measures';
import { Refusal, invalid } from '../refusal';
import type { Study } from '../study';

function refuseBaselined(study: Study, requirementId: string, context: EditContext): void {
  const requirement = referred(study, 'requirement', 'requirementId', requirementId);
  if (requirement.state === 'baselined')
    refuseControlled(context, requirement.key, 'is baselined, its verifications included');
  if (requirement.state === 'withdrawn')
    throw new Refusal('state', `${requirement.key} is withdrawn.`, {
      field: 'requirementId',
      value: requirement.key,
      expected: 'a requirement in force',
    });
}

/** Refuses a link that does not hold: no analysis, no such output, another dimension than the limit. */
export function refuseUnfit(study: Study, verification: Verification): void {
  const requirement = study.held('requirement', verification.requirementId);
  if (verification.method !== 'analysis') {
    if (verification.analysisId)
      throw invalid(
        'analysisId',
        verification.method,
        'an analysis can only be linked where the method of verification is analysis.',
      );
    return;
  }
  if (!verification.analysisId) return;
  const analysis = referred(study, 'analysis', 'analysisId', verification.analysisId);
  const outputs = outputsOf(study, analysis);
  const output = outputs.find((port) => port.name === verification.output);
  if (!output)
    throw invalid(
      'output',
      verification.output,
      `${analysis.key} gives ${outputs.map((port) => port.name).join(', ')}.`,
    );
  if (!requirement.limit)
    throw invalid(
      'requirementId',
      requirement.key,
      `${requirement.key} has no limit to compare ${output.name} with; give it a limit first, or verify it by another method.`,
    );
  const needed = knownDimension(requirement.limit.value.unit);
  if (output.dimension !== needed) {
    throw invalid(
      'output',
      `${analysis.key} ${output.name}`,
      `it is ${a(describeDimension(output.dimension))}; the limit of ${requirement.key} is ${a(describeDimension(needed))}.`,
    );
  }
  // What an external result in kelvin means is not stated with it; a computed one knows.
  const known = analysis.kind !== 'external' && isTemperature(needed);
  if (known && output.temperature !== requirement.limit.temperature) {
    throw invalid(
      'output',
      `${analysis.key} ${output.name}`,
      `it is ${temperatureInWords(output.temperature)}; the limit of ${requirement.key} is on ${temperatureInWords(requirement.limit.temperature)}.`,
    );
  }
}

/** Only one verification of a requirement decides: marking one takes the mark from the others. */
function keepOneDeciding(study: Study, verification: Verification): void {
  if (!verification.deciding) return;
  for (const other of study.find('verification', 'requirementId', verification.requirementId)) {
    if (other.id !== verification.id && other.deciding) revised(study, 'verification', other, { deciding: false });
  }
}

/** Links a way of verifying to a requirement. */
export const linkVerification: Apply<'verification.link'> = (study, command, context) => {
  const { type: _type, id: _id, ...fields } = command;
  refuseBaselined(study, fields.requirementId, context);
  const verification: Verification = {
    ...fields,
    id: freshId(study, 'verification', command, context),
    version: 1,
    finding: null,
  };
  refuseUnfit(study, verification);
  const same = study
    .find('verification', 'requirementId', fields.requirementId)
    .find(
      (other) => other.analysisId !== null && other.analysisId === fields.analysisId && other.output === fields.output,
    );
  if (same) throw invalid('analysisId', fields.output, 'this output is already linked to this requirement.');
  study.put('verification', verification);
  keepOneDeciding(study, verification);
};

/** Changes how a requirement is verified. */
export const reviseVerification: Apply<'verification.revise'> = (study, command, context) => {
  const verification = target(study, 'verification', command);
  refuseBaselined(study, verification.requirementId, context);
  const changes = given(command.changes as Partial<CommandOf<'verification.link'>>);
  const next: Verification = {
    ...verification,
    ...changes,
    finding: changes.method && changes.method !== verification.method ? null : verification.finding,
  };
  refuseUnfit(study, next);
  revised(study, 'verification', verification, next);
  keepOneDeciding(study, next);
};

/** Removes a way of verifying from a requirement. */
export const unlinkVerification: Apply<'verification.unlink'> = (study, command, context) => {
  const verification = target(study, 'verification', command);
  refuseBaselined(study, verification.requirementId, context);
  study.remove('verification', verification.id);
};

/** Records a person's finding with its evidence, for test, inspection, demonstration and review of design, or where no limit is stated. */
export const recordFinding: Apply<'verification.record'> = (study, command, context) => {
  const verification = target(study, 'verification', command);
  const requirement = study.held('requirement', verification.requirementId);
  if (requirement.state === 'withdrawn')
    throw new Refusal('state', `${requirement.key} is withdrawn.`, {
      field: 'id',
      value: requirement.key,
      expected: 'a requirement in force',
    });
  if (verification.method === 'analysis' && requirement.limit) {
    throw invalid(
      'id',
      requirement.key,
      `${requirement.key} has a limit and is verified by analysis: its verdict is computed, not recorded.`,
    );
  }
  const { met, document, issue, note } = command;
  revised(study, 'verification', verification, {
    finding: { met, document, issue, note, personId: context.actorId, at: context.at },
  });
};
