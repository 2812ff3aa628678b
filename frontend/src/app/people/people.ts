import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import type { PersonAnswer, PersonChange } from '@shared/contract';
import { type Observable } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { SessionStore } from '../core/session/session-store';
import { roleList } from '../core/study/role-name';
import { TitleBlock } from '../core/title-block';
import { Ask } from '../ui/ask/ask';
import { Waiting } from '../ui/waiting/waiting';
import { InviteDialog } from './invite-dialog';
import { PeopleApi } from './people-api';
import { RolesDialog, type RolesQuestion } from './roles-dialog';

/** People as the administrator sees them: who they are, which roles they hold, whether they can sign in. */
@Component({
  selector: 'dp-people',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatMenu, MatMenuItem, MatMenuTrigger, Waiting],
  templateUrl: './people.html',
  styleUrl: './people.scss',
})
export class People {
  private readonly api = inject(PeopleApi);
  private readonly dialog = inject(MatDialog);
  private readonly line = inject(ErrorLine);
  private readonly ask = inject(Ask);
  private readonly session = inject(SessionStore);

  protected readonly people = load(
    () => 'people',
    () => this.api.people(),
  );
  protected readonly rows = computed(() =>
    (this.people.value()?.people ?? []).map((person) => ({
      person,
      isMe: person.id === this.session.person()?.id,
      state: person.disabled ? 'disabled, cannot sign in' : person.invited ? 'invited, not yet accepted' : '',
      roles: person.memberships
        .filter((membership) => membership.roles.length > 0)
        .map((membership) => ({
          key: membership.study.key,
          name: membership.study.name,
          roles: roleList(membership.roles),
        })),
    })),
  );

  constructor() {
    inject(TitleBlock).register({
      name: () => 'People',
      actions: () => [
        {
          label: 'Invite a person',
          main: true,
          shortcut: 'n',
          disabled: this.people.value() === undefined,
          run: () => this.invite(),
        },
      ],
    });
  }

  protected editRoles(person: PersonAnswer): void {
    const studies = this.people.value()?.studies ?? [];
    this.dialog
      .open<RolesDialog, RolesQuestion, boolean>(RolesDialog, { data: { person, studies }, width: '720px' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed !== true) return;
        this.people.reload();
        if (person.id === this.session.person()?.id) void this.session.refresh();
      });
  }

  protected inviteAgain(person: PersonAnswer): void {
    this.does(this.api.inviteAgain(person.id), `A fresh link was sent to ${person.email}.`);
  }

  protected async setAdministrator(person: PersonAnswer, administrator: boolean): Promise<void> {
    const answer = await this.ask.ask({
      title: administrator ? `Make ${person.name} an administrator?` : `Take administration from ${person.name}?`,
      text: administrator
        ? 'Administrators manage people and studies. The role gives no technical authority in any study.'
        : 'Roles in studies stay as they are.',
      action: administrator ? 'Make administrator' : 'Take it',
    });
    if (answer !== undefined) this.change(person, { administrator });
  }

  protected async setDisabled(person: PersonAnswer, disabled: boolean): Promise<void> {
    if (disabled) {
      const answer = await this.ask.ask({
        title: `Disable ${person.name}?`,
        text: 'Every open session ends at once and signing in is refused. What they wrote and signed stays on record.',
        action: 'Disable',
      });
      if (answer === undefined) return;
    }
    this.change(person, { disabled });
  }

  private invite(): void {
    this.dialog
      .open<InviteDialog, unknown, string>(InviteDialog, { data: this.people.value()?.studies ?? [], width: '720px' })
      .afterClosed()
      .subscribe((name) => {
        if (name === undefined) return;
        this.people.reload();
        this.line.tell(`The invitation to ${name} is on its way.`);
      });
  }

  private change(person: PersonAnswer, change: Omit<PersonChange, 'version'>): void {
    this.does(this.api.change(person.id, { version: person.version, ...change }), '');
  }

  private does(work: Observable<unknown>, news: string): void {
    work.subscribe({
      next: () => {
        this.people.reload();
        if (news !== '') this.line.tell(news);
      },
      error: (error: unknown) => {
        this.people.reload();
        this.line.report(error);
      },
    });
  }
}
