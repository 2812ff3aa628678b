import { Injectable, inject } from '@angular/core';
import type { ElementRow } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Edits } from '../core/study/edits';
import { Acts } from '../core/acts/acts';
import { AskFields } from '../core/acts/ask-fields';
import { type AskedField } from '../core/acts/fields-dialog';
import { Ask } from '../ui/ask/ask';
import { branchOf } from './element-lines';

/** Adds, renames, moves and removes elements. */
@Injectable({ providedIn: 'root' })
export class ElementActs {
  private readonly edits = inject(Edits);
  private readonly acts = inject(Acts);
  private readonly ask = inject(Ask);
  private readonly fields = inject(AskFields);

  /** Asks for a new element below another; the key of the one that was added, or undefined. */
  async add(rows: readonly ElementRow[], below: ElementRow | null): Promise<string | undefined> {
    let added: string | undefined;
    await this.fields.ask({
      title: 'Add an element',
      text: 'Its code begins the keys of the requirements allocated to it.',
      action: 'Add it',
      fields: [
        { name: 'key', label: 'Code', kind: 'line', hint: '2 to 8 capital letters or digits, such as RAD' },
        { name: 'name', label: 'Name', kind: 'line' },
        parentField(rows, below?.id ?? ''),
        { name: 'description', label: 'Description', kind: 'text', optional: true },
      ],
      send: async (values) => {
        const key = (values['key'] ?? '').trim();
        const answer = await firstValueFrom(
          this.edits.give([
            {
              type: 'element.create',
              key,
              name: (values['name'] ?? '').trim(),
              parentId: values['parentId'] || null,
              description: (values['description'] ?? '').trim(),
            },
          ]),
        );
        added = key;
        this.acts.tell(answer, `${key} was added`);
      },
    });
    return added;
  }

  /** Renames an element, moves it below another, or describes it; its code stays. */
  async edit(rows: readonly ElementRow[], row: ElementRow): Promise<void> {
    const inside = new Set(branchOf(rows, row.id).map(({ id }) => id));
    await this.fields.ask({
      title: `Rename or move ${row.key}`,
      text: '',
      action: 'Save',
      fields: [
        { name: 'name', label: 'Name', kind: 'line', value: row.name },
        parentField(
          rows.filter(({ id }) => !inside.has(id)),
          row.parentId ?? '',
        ),
        { name: 'description', label: 'Description', kind: 'text', optional: true, value: row.description },
      ],
      send: async (values) => {
        const answer = await firstValueFrom(
          this.edits.give([
            {
              type: 'element.revise',
              id: row.id,
              version: row.version,
              changes: {
                name: (values['name'] ?? '').trim(),
                parentId: values['parentId'] || null,
                description: (values['description'] ?? '').trim(),
              },
            },
          ]),
        );
        this.acts.tell(answer, `${row.key} was saved`);
      },
    });
  }

  async remove(row: ElementRow): Promise<void> {
    const answer = await this.ask.ask({
      title: `Remove ${row.key} ${row.name}?`,
      text: 'Only an element that nothing is below or allocated to can be removed.',
      action: `Remove ${row.key}`,
    });
    if (answer === undefined) return;
    await this.acts.give([{ type: 'element.remove', id: row.id, version: row.version }], `${row.key} was removed`);
  }
}

function parentField(rows: readonly ElementRow[], value: string): AskedField {
  return {
    name: 'parentId',
    label: 'Part of',
    kind: 'choice',
    optional: true,
    value,
    choices: [
      { value: '', label: 'nothing: it stands at the top' },
      ...rows.map(({ id, key, name, depth }) => ({ value: id, label: `${'\u2003'.repeat(depth)}${key} ${name}` })),
    ],
  };
}
