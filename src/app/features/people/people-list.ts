import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import {
  ORGANISATION_ROLES,
  personSchema,
  type OrganisationRole,
  type Person,
  type PersonChange,
} from '../../../../shared/contracts/api';
import { Api, listOf, loaded } from '../../core/api';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { Session } from '../../core/session';
import { MomentView } from '../../core/words';
import { confirm } from '../../ui/dialog';
import { WhenLoaded } from '../../ui/states';
import { InviteDialog } from './invite-dialog';

const ROLE_WORDS: Record<OrganisationRole, string> = { administrator: 'Administrator', member: 'Member' };

@Component({
  selector: 'app-people-list',
  imports: [MomentView, WhenLoaded],
  templateUrl: './people-list.html',
  styles: `
    .email {
      display: block;
      color: var(--ink-second);
      font-weight: 400;
    }
    .number .acts {
      justify-content: flex-end;
    }
    .off th,
    .off td {
      color: var(--ink-third);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeopleList {
  private readonly api = inject(Api);
  private readonly dialogs = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  protected readonly people = loaded(() => '/api/people', listOf(personSchema), 'the people');
  protected readonly roles = ORGANISATION_ROLES;
  protected readonly words = ROLE_WORDS;

  constructor() {
    pageHead(() => ({ title: 'People', trail: [] }));
  }

  /** Nobody shuts themselves out: of their own account only the rest is offered. */
  protected isSelf(person: Person): boolean {
    return person.id === this.session.person()?.id;
  }

  protected state(person: Person): string {
    if (person.disabled) return 'Disabled';
    return person.invited ? 'Invited' : 'Active';
  }

  protected async invite(): Promise<void> {
    const dialog = this.dialogs.open<InviteDialog, undefined, Person>(InviteDialog, { width: '30rem' });
    const invited = await firstValueFrom(dialog.afterClosed());
    if (invited === undefined) return;
    this.notices.say(`The invitation to ${invited.email} is on its way; it stands under outgoing mail.`);
    this.people.reload();
  }

  protected async setRole(person: Person, event: Event): Promise<void> {
    const chosen = event.target instanceof HTMLSelectElement ? event.target.value : '';
    const role = ORGANISATION_ROLES.find((candidate) => candidate === chosen);
    if (role !== undefined) await this.change(person, { role }, `${person.name} is ${role} now.`);
  }

  protected async setMayCreate(person: Person, event: Event): Promise<void> {
    const mayCreateProducts = event.target instanceof HTMLInputElement && event.target.checked;
    const may = mayCreateProducts ? 'may create products' : 'may not create products any more';
    await this.change(person, { mayCreateProducts }, `${person.name} ${may}.`);
  }

  protected async setDisabled(person: Person, disabled: boolean): Promise<void> {
    const done = disabled
      ? `${person.name} is signed out and cannot sign in.`
      : `${person.name} may sign in again.`;
    await this.change(person, { disabled }, done);
  }

  protected async remove(person: Person): Promise<void> {
    const sure = await confirm(this.dialogs, {
      title: `Remove ${person.name}?`,
      text: 'What they did stays in the records under their name. To keep somebody out for a while, disable them.',
      act: 'Remove person',
    });
    if (!sure) return;
    await this.notices.during(
      () => this.api.act('DELETE', `/api/people/${person.id}`),
      `${person.name} is removed.`,
    );
    this.people.reload();
  }

  private async change(person: Person, change: PersonChange, done: string): Promise<void> {
    await this.notices.during(() => this.api.act('PATCH', `/api/people/${person.id}`, change), done);
    this.people.reload();
  }
}
