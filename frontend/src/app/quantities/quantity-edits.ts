import { Injectable, computed, inject, signal } from '@angular/core';
import type { CommandOf, EditAnswer, QuantityRow } from '@shared/contract';
import { mayGive } from '@shared/contract/permissions';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { type ProblemError, fieldSentence, toProblem } from '../core/http/problem-error';
import { Edits } from '../core/study/edits';
import { StudyContext } from '../core/study/study-context';
import { Acts } from '../core/acts/acts';
import { ProposeChange } from '../core/acts/propose-change';
import { BASES, type EditedField, readUncertainty, readValue, valueText } from './quantity-text';

/** What was typed into a cell and is on its way, or was refused and why. */
export interface Held {
  readonly row: QuantityRow;
  readonly field: EditedField;
  readonly typed: string;
  /** Why it was refused; empty while it is on its way. */
  readonly message: string;
  /** The quantity as somebody else left it meanwhile, where that is why. */
  readonly isStale: boolean;
}

type Set = CommandOf<'quantity.set'>;

/** Edits of quantities from their rows: direct where they are working, through a change request where they are controlled. */
@Injectable()
export class QuantityEdits {
  private readonly context = inject(StudyContext);
  private readonly edits = inject(Edits);
  private readonly acts = inject(Acts);
  private readonly line = inject(ErrorLine);
  private readonly proposals = inject(ProposeChange);
  private readonly cells = signal<readonly Held[]>([]);

  /** Everything typed that does not stand yet. */
  readonly held = this.cells.asReadonly();
  readonly refused = computed(() => this.cells().filter(({ message }) => message !== ''));

  /** Whether the person can edit this row from here, directly or by proposing a change. */
  mayEdit(row: QuantityRow): boolean {
    if (!this.context.isEditable()) return false;
    const roles = this.context.roles();
    if (this.context.standpoint().kind === 'draft') return mayGive('change.amend', roles);
    return mayGive(this.isProposal(row) ? 'change.write' : 'quantity.set', roles);
  }

  /** What was typed into a cell, as long as the row has not moved on. */
  typedInto(row: QuantityRow, field: EditedField): Held | undefined {
    return this.cells().find(
      (cell) => isSame(cell, row, field) && (cell.message !== '' || row.version <= cell.row.version),
    );
  }

  drop({ row, field }: Pick<Held, 'row' | 'field'>): void {
    this.cells.update((cells) => cells.filter((cell) => !isSame(cell, row, field)));
  }

  /** Gives what was typed into a cell. What is refused is kept with its reason. */
  async give(row: QuantityRow, field: EditedField, typed: string): Promise<void> {
    this.drop({ row, field });
    const read = commandOf(row, field, typed);
    if (!read.ok) return this.hold(row, field, typed, read.message);
    if (this.isProposal(row)) return this.propose(row, field, typed, read.command);
    this.hold(row, field, typed, '');
    try {
      const answer = await firstValueFrom(this.edits.give([read.command]));
      this.tell(answer, row, field);
    } catch (error) {
      const problem = toProblem(error);
      this.hold(row, field, typed, sentenceOf(problem, field), problem.code === 'stale');
    }
  }

  private isProposal(row: QuantityRow): boolean {
    return row.state === 'controlled' && this.context.standpoint().kind !== 'draft';
  }

  private propose(row: QuantityRow, field: EditedField, typed: string, command: Set): Promise<void> {
    const becomes = typed.trim() === '' ? 'is taken away' : `becomes ${typed.trim()}`;
    return this.proposals.open({
      title: `Change ${row.key} ${row.name}`,
      what: `${row.key} ${row.name} is controlled: its ${field} ${becomes}`,
      edits: [command],
    });
  }

  /** Says what came of it, and offers to take it back. */
  private tell(answer: EditAnswer, row: QuantityRow, field: EditedField): void {
    this.acts.tell(answer, `${row.key} ${field} was saved`);
    if (this.context.standpoint().kind === 'draft') return;
    const said = this.line.announcement()?.text ?? '';
    this.line.tell(said, { label: 'Take back', run: () => void this.takeBack(answer.revision, row) });
  }

  private async takeBack(revision: number, row: QuantityRow): Promise<void> {
    this.line.dismiss();
    await this.acts.give([{ type: 'edit.undo', revision }], `The edit of ${row.key} was taken back`, { draft: null });
  }

  private hold(row: QuantityRow, field: EditedField, typed: string, message: string, isStale = false): void {
    this.cells.update((cells) => [
      ...cells.filter((cell) => !isSame(cell, row, field)),
      { row, field, typed, message, isStale },
    ]);
  }
}

function isSame(cell: Pick<Held, 'row' | 'field'>, row: QuantityRow, field: EditedField): boolean {
  return cell.row.id === row.id && cell.field === field;
}

function sentenceOf(problem: ProblemError, field: EditedField): string {
  const found = problem.fields.find((one) => one.field.includes(field)) ?? problem.fields[0];
  const sentence = found === undefined ? '' : fieldSentence(found);
  return sentence || problem.detail || problem.title;
}

/** The command for what was typed into one cell; everything else stays as the row has it. */
export function commandOf(
  row: QuantityRow,
  field: EditedField,
  typed: string,
): { readonly ok: true; readonly command: Set } | { readonly ok: false; readonly message: string } {
  const present = { type: 'quantity.set' as const, id: row.id, version: row.version, value: presentValue(row) };
  switch (field) {
    case 'value': {
      const read = readValue(row, typed);
      return read.ok ? { ok: true, command: { ...present, value: read.value } } : read;
    }
    case 'uncertainty': {
      const read = readUncertainty(row.unit, typed);
      return read.ok ? { ok: true, command: { ...present, uncertainty: read.value } } : read;
    }
    case 'basis': {
      const basis = BASES.find((one) => one === typed);
      if (basis === undefined)
        return { ok: false, message: `“${typed}” is no basis. Right would be ${BASES.join(', ')}.` };
      return { ok: true, command: { ...present, basis: basis as Set['basis'] } };
    }
    case 'source':
      return { ok: true, command: { ...present, source: typed.trim() } };
  }
}

function presentValue(row: QuantityRow): Set['value'] {
  return valueText(row) === '' || row.value === null ? null : { text: row.value.text, unit: row.value.unit };
}
