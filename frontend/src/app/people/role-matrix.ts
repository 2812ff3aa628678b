import { ChangeDetectionStrategy, Component, input, model } from '@angular/core';
import type { Role } from '@shared/contract';
import { roleName } from '../core/study/role-name';

/** Roles by key of a study. */
export type RolesByStudy = Readonly<Record<string, readonly Role[]>>;

const ALL: readonly Role[] = ['requirements-owner', 'analyst', 'board-member', 'board-chair', 'reader'];

/** Which roles a person has in which study, to tick. */
@Component({
  selector: 'dp-role-matrix',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <table class="ruled">
      <thead>
        <tr>
          <th scope="col">Study</th>
          @for (role of roles; track role) {
            <th scope="col" class="tick">{{ name(role) }}</th>
          }
        </tr>
      </thead>
      <tbody>
        @for (study of studies(); track study.key) {
          <tr>
            <th scope="row">{{ study.name }}</th>
            @for (role of roles; track role) {
              <td class="tick">
                <input
                  type="checkbox"
                  [attr.aria-label]="name(role) + ' in ' + study.name"
                  [checked]="has(study.key, role)"
                  (change)="toggle(study.key, role)"
                />
              </td>
            }
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    :host {
      display: block;
      overflow-x: auto;
    }
    .tick {
      text-align: center;
      white-space: normal;
    }
    tbody th {
      border-bottom: 1px solid var(--hair);
      font-size: 14px;
      color: var(--ink);
      white-space: normal;
    }
    input {
      margin: 3px;
    }
  `,
})
export class RoleMatrix {
  readonly studies = input.required<readonly { readonly key: string; readonly name: string }[]>();
  readonly value = model.required<RolesByStudy>();
  protected readonly roles = ALL;
  protected readonly name = roleName;

  protected has(study: string, role: Role): boolean {
    return this.value()[study]?.includes(role) ?? false;
  }

  protected toggle(study: string, role: Role): void {
    this.value.update((value) => {
      const held = value[study] ?? [];
      const next = held.includes(role)
        ? held.filter((other) => other !== role)
        : ALL.filter((other) => other === role || held.includes(other));
      return { ...value, [study]: next };
    });
  }
}
