import type { Analysis, CommandOf } from '@shared/contract';
import { describeDimension } from '@shared/units';
import { checkAnalysis, knownDimension, outputsOf, temperatureInWords } from '../analysis-ports';
import { digestOf } from '../digest';
import {
  type Apply,
  type EditContext,
  freshId,
  given,
  nextKey,
  referred,
  refuseControlled,
  revised,
  target,
} from '../edit-context';
import { a, readMeasure, readUncertainty } from '../measures';
import { Refusal, invalid } from '../refusal';
import type { Study } from '../study';

type Fields = Omit<CommandOf<'analysis.create'>, 'type' | 'id' | 'kind'>;

function readResults(results: Fields['results']): Analysis['results'] {
  return results.map((result, index) => {
    const value = readMeasure(`results[${index}].value`, result.value, null);
    return {
      ...result,
      value,
      uncertainty: readUncertainty(
        `results[${index}].uncertainty`,
        result.uncertainty,
        knownDimension(result.value.unit),
      ),
    };
  });
}

/** Adds an analysis, after checking names, formulas, dimensions and circles. */
export const createAnalysis: Apply<'analysis.create'> = (study, command, context) => {
  const { type: _type, id: _id, results, ...fields } = command;
  if (fields.elementId) referred(study, 'element', 'elementId', fields.elementId);
  const analysis: Analysis = {
    ...fields,
    id: freshId(study, 'analysis', command, context),
    version: 1,
    key: nextKey(study, 'AN'),
    results: readResults(results),
    authorId: context.actorId,
    check: null,
  };
  checkAnalysis(study, analysis);
  study.put('analysis', analysis);
};

/** Whether an analysis verifies a baselined requirement, so that its definition is controlled. */
export function isControlled(study: Study, analysis: Analysis): boolean {
  return study
    .find('verification', 'analysisId', analysis.id)
    .some((verification) => study.get('requirement', verification.requirementId)?.state === 'baselined');
}

function refuseUnlessEditable(study: Study, analysis: Analysis, context: EditContext): void {
  if (isControlled(study, analysis))
    refuseControlled(context, analysis.key, 'verifies a baselined requirement, so its definition is controlled');
}

/** Changes the definition of an analysis; a signature under the old one is void, and what others use of it stays. */
export const reviseAnalysis: Apply<'analysis.revise'> = (study, command, context) => {
  const analysis = target(study, 'analysis', command);
  refuseUnlessEditable(study, analysis, context);
  const { results, ...changes } = command.changes as Partial<Fields>;
  if (changes.elementId) referred(study, 'element', 'changes.elementId', changes.elementId);
  const next: Analysis = {
    ...analysis,
    ...given(changes as Partial<Analysis>),
    ...(results === undefined ? {} : { results: readResults(results) }),
    check: null,
    // The last person to write the definition is its author: that person cannot sign its check.
    authorId: context.actorId,
    version: analysis.version + 1,
  };
  checkAnalysis(study, next);
  study.put('analysis', next);
  refuseBrokenUsers(study, analysis, next);
};

/** Refuses a revision that takes away, or turns into another dimension, an output that something rests on. */
export function refuseBrokenUsers(study: Study, before: Analysis, after: Analysis): void {
  const old = new Map(outputsOf(study, before).map((port) => [port.name, port]));
  const now = new Map(outputsOf(study, after).map((port) => [port.name, port]));
  const uses: [string, string][] = [];
  for (const user of study.all('analysis')) {
    for (const input of user.inputs)
      if ('analysisId' in input.from && input.from.analysisId === after.id) uses.push([input.from.output, user.key]);
  }
  for (const verification of study.find('verification', 'analysisId', after.id)) {
    if (verification.output)
      uses.push([verification.output, study.get('requirement', verification.requirementId)?.key ?? 'a requirement']);
  }
  for (const [output, user] of uses) {
    const was = old.get(output);
    const is = now.get(output);
    if (!is)
      throw new Refusal(
        'in-use',
        `${user} rests on ${after.key} ${output}; keep that output or relink ${user} first.`,
        { field: 'changes.lines', value: output, expected: `an output named ${output}` },
      );
    if (was && is.dimension !== was.dimension) {
      throw invalid(
        'changes.lines',
        output,
        `${user} rests on ${output} as ${a(describeDimension(was.dimension))}; it would become ${a(describeDimension(is.dimension))}.`,
      );
    }
    if (was && is.temperature !== was.temperature) {
      throw invalid(
        'changes.lines',
        output,
        `${user} rests on ${output} as ${temperatureInWords(was.temperature)}; it would become ${temperatureInWords(is.temperature)}.`,
      );
    }
  }
}

/** Removes an analysis that nothing rests on. */
export const removeAnalysis: Apply<'analysis.remove'> = (study, command, context) => {
  const analysis = target(study, 'analysis', command);
  refuseUnlessEditable(study, analysis, context);
  const users = [
    ...study
      .all('analysis')
      .filter((user) =>
        user.inputs.some((input) => 'analysisId' in input.from && input.from.analysisId === analysis.id),
      )
      .map((user) => user.key),
    ...study
      .find('verification', 'analysisId', analysis.id)
      .map((verification) => study.get('requirement', verification.requirementId)?.key ?? ''),
  ];
  if (users.length > 0)
    throw new Refusal('in-use', `${analysis.key} is used by ${users.join(', ')}. Unlink it there first.`, {
      field: 'id',
      value: analysis.key,
      expected: 'an analysis that nothing rests on',
    });
  study.remove('analysis', analysis.id);
};

/** Digest of what a check signature covers: the definition, not its name or its owner. */
export function definitionDigest(analysis: Analysis): string {
  const { kind, inputs, lines, method, results, assumptions } = analysis;
  return digestOf({ kind, inputs, lines, method, results, assumptions });
}

/** Signs the check of an analysis; who wrote it cannot. */
export const checkAnalysisBySignature: Apply<'analysis.check'> = (study, command, context) => {
  const analysis = target(study, 'analysis', command);
  if (analysis.authorId === context.actorId)
    throw new Refusal('forbidden', `You wrote ${analysis.key}; somebody else signs its check.`, {
      field: 'id',
      value: analysis.key,
      expected: 'an analysis written by somebody else',
    });
  if (analysis.check)
    throw new Refusal(
      'state',
      `${analysis.key} is already checked by ${context.personName(analysis.check.personId)}.`,
      { field: 'id', value: analysis.key, expected: 'an unchecked analysis' },
    );
  revised(study, 'analysis', analysis, {
    check: { personId: context.actorId, at: context.at, digest: definitionDigest(analysis), remark: command.remark },
  });
};
