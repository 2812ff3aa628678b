import { Injectable, inject } from '@angular/core';
import type { BindableView, RequirementSheet, VerificationView } from '@shared/contract';
import { describeDimension, parseUnit } from '@shared/units';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../../core/errors/error-line';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Edits } from '../../core/study/edits';
import { Ask } from '../../ui/ask/ask';
import { Acts } from '../../core/acts/acts';
import { AskFields } from '../../core/acts/ask-fields';
import { type AskedField, type Values } from '../../core/acts/fields-dialog';
import { RequirementApi } from '../requirement-api';

type Method = VerificationView['method'];
const METHODS: readonly Method[] = ['analysis', 'test', 'inspection', 'demonstration', 'review of design'];
const SEPARATOR = ' / ';

/** How a requirement is verified: link an analysis or plan another method, record a finding, choose which decides. */
@Injectable({ providedIn: 'root' })
export class VerificationActs {
  private readonly api = inject(RequirementApi);
  private readonly ask = inject(Ask);
  private readonly askFields = inject(AskFields);
  private readonly acts = inject(Acts);
  private readonly edits = inject(Edits);
  private readonly line = inject(ErrorLine);
  private readonly units = inject(UnitPreferences);

  /** Links the output of an analysis, or plans a test, inspection, demonstration or review. */
  async link(sheet: RequirementSheet, method: Method = 'analysis'): Promise<void> {
    let outputs: BindableView['outputs'];
    try {
      outputs = outputsFor(sheet, (await firstValueFrom(this.api.bindable())).outputs);
    } catch (error) {
      this.line.report(error);
      return;
    }
    await this.askFields.ask({
      title: sheet.limit === null || method !== 'analysis' ? `Verify ${sheet.key}` : 'Link an analysis',
      text: `${sheet.key} ${sheet.title}`,
      action: 'Link it',
      fields: [
        methodField(method),
        {
          name: 'output',
          label: 'Output of an analysis',
          kind: 'choice',
          choices: [
            { value: '', label: outputs.length > 0 ? 'choose' : 'no output has the dimension of this limit' },
            ...outputs.map((output) => ({ value: valueOf(output), label: this.labelOf(output) })),
          ],
          hint:
            sheet.limit === null
              ? 'Give the requirement a limit first; an output is compared with it.'
              : 'Only outputs of the dimension of the limit are listed.',
          shownIf: (values) => values['method'] === 'analysis',
          refusedAs: ['analysisId', 'requirementId'],
        },
        ...planFields(sheet),
        {
          name: 'deciding',
          label: 'It decides the verdict where there are several',
          kind: 'tick',
          value: sheet.verifications.length === 0 ? 'yes' : '',
        },
      ],
      send: async (values) => {
        const linked = values['method'] === 'analysis' ? (values['output'] ?? '').split(SEPARATOR) : [];
        const answer = await firstValueFrom(
          this.edits.give([
            {
              type: 'verification.link',
              requirementId: sheet.id,
              ...planOf(values),
              analysisId: linked[0] ?? null,
              output: linked[1] ?? null,
              deciding: values['deciding'] === 'yes',
            },
          ]),
        );
        this.acts.tell(answer, `${sheet.key} is verified by ${values['method']}`);
      },
    });
  }

  /** Changes level, stage, gate and criterion. */
  async revise(sheet: RequirementSheet, verification: VerificationView): Promise<void> {
    await this.askFields.ask({
      title: `How ${sheet.key} is verified by ${verification.method}`,
      text: '',
      action: 'Save',
      fields: planFields(sheet, verification),
      send: async (values) => {
        const { method: _method, ...changes } = planOf({ ...values, method: verification.method });
        const answer = await firstValueFrom(
          this.edits.give([
            { type: 'verification.revise', id: verification.id, version: verification.version, changes },
          ]),
        );
        this.acts.tell(answer, 'The verification was saved');
      },
    });
  }

  /** Lets this one decide the verdict. */
  decide(verification: VerificationView): Promise<unknown> {
    const { id, version } = verification;
    return this.acts.give(
      [{ type: 'verification.revise', id, version, changes: { deciding: true } }],
      'It decides the verdict now',
    );
  }

  async unlink(sheet: RequirementSheet, verification: VerificationView): Promise<void> {
    const what = verification.analysisKey ?? verification.method;
    const answer = await this.ask.ask({
      title: `Unlink ${what} from ${sheet.key}?`,
      text: 'The verdict no longer rests on it. What was recorded stays in the ledger.',
      action: `Unlink ${what}`,
    });
    if (answer === undefined) return;
    const { id, version } = verification;
    await this.acts.give([{ type: 'verification.unlink', id, version }], `${what} was unlinked`);
  }

  /** Records what a test, inspection, demonstration or review has found. */
  async record(sheet: RequirementSheet, verification: VerificationView): Promise<void> {
    await this.askFields.ask({
      title: `Record the finding of the ${verification.method}`,
      text: `${sheet.key} ${sheet.title}. The finding goes on record with your name.`,
      action: 'Record the finding',
      fields: [
        {
          name: 'met',
          label: 'Finding',
          kind: 'choice',
          choices: [
            { value: 'yes', label: 'the requirement is met' },
            { value: 'no', label: 'the requirement is not met' },
          ],
        },
        { name: 'document', label: 'Evidence document', kind: 'line' },
        { name: 'issue', label: 'Issue', kind: 'line', hint: 'Issue and date of the document' },
        { name: 'note', label: 'Note', kind: 'text', optional: true },
      ],
      send: async (values) => {
        const answer = await firstValueFrom(
          this.edits.give([
            {
              type: 'verification.record',
              id: verification.id,
              version: verification.version,
              met: values['met'] === 'yes',
              document: values['document'] ?? '',
              issue: values['issue'] ?? '',
              note: values['note'] ?? '',
            },
          ]),
        );
        this.acts.tell(answer, 'The finding was recorded');
      },
    });
  }

  private labelOf(output: BindableView['outputs'][number]): string {
    const value = output.si === null ? 'not computable' : this.units.show(output.si, output.unit);
    return `${output.key} ${output.output}${output.name === '' || output.name === output.output ? '' : `, ${output.name}`}: ${value}`;
  }
}

function valueOf(output: BindableView['outputs'][number]): string {
  return `${output.analysisId}${SEPARATOR}${output.output}`;
}

/** Outputs that can be compared with the limit: those of its dimension, not linked yet. */
export function outputsFor(
  sheet: Pick<RequirementSheet, 'limit' | 'verifications'>,
  outputs: BindableView['outputs'],
): BindableView['outputs'] {
  if (sheet.limit === null) return [];
  const unit = parseUnit(sheet.limit.value.unit);
  if (!unit.ok) return [];
  const dimension = describeDimension(unit.unit.dimension);
  return outputs.filter(
    (output) =>
      output.dimension === dimension &&
      !sheet.verifications.some((one) => one.analysisId === output.analysisId && one.output === output.output),
  );
}

function methodField(method: Method): AskedField {
  return {
    name: 'method',
    label: 'Method of verification',
    kind: 'choice',
    value: method,
    choices: METHODS.map((value) => ({ value, label: value })),
  };
}

function planFields(sheet: RequirementSheet, stands?: VerificationView): readonly AskedField[] {
  return [
    {
      name: 'level',
      label: 'Level',
      kind: 'line',
      optional: true,
      hint: 'At which level of the product it is verified',
      value: stands?.level ?? sheet.level,
    },
    {
      name: 'stage',
      label: 'Stage',
      kind: 'line',
      optional: true,
      hint: 'Qualification, acceptance, in orbit …',
      value: stands?.stage ?? '',
    },
    {
      name: 'gate',
      label: 'Gate',
      kind: 'line',
      optional: true,
      hint: 'Review by which it is due',
      value: stands?.gate ?? '',
    },
    {
      name: 'criterion',
      label: 'Criterion',
      kind: 'text',
      optional: true,
      hint: 'When it counts as passed',
      value: stands?.criterion ?? '',
    },
  ];
}

function planOf(values: Values) {
  return {
    method: METHODS.find((method) => method === values['method']) ?? 'analysis',
    level: values['level'] ?? '',
    stage: values['stage'] ?? '',
    gate: values['gate'] ?? '',
    criterion: values['criterion'] ?? '',
  };
}
