import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import * as z from '../../../../shared/contracts/zod';
import { memberSchema, PRODUCT_ROLES, type Member, type ProductRole } from '../../../../shared/contracts/api';
import { ROLE_WORDS } from '../../core/answers';
import { Api, listOf, loaded } from '../../core/api';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { WhenLoaded } from '../../ui/states';
import { AddMember } from './add-member';

const directoryEntrySchema = z.object({ id: z.string(), name: z.string(), email: z.string() });

/** Who has which role in the product. Administrators set roles; everybody else in the product sees them. */
@Component({
  selector: 'app-members-panel',
  imports: [AddMember, WhenLoaded],
  template: `
    <h2>People in this product</h2>
    <div *appWhenLoaded="members; let members; let renewing = renewing" [class.renewing]="renewing">
      @if (members.length === 0) {
        <p class="note">Nobody has a role here yet.</p>
      }
      <ul>
        @for (member of members; track member.personId) {
          <li>
            <span class="who">
              <span class="strong-text">{{ member.name }}</span>
              <span class="second">{{ member.email }}</span>
            </span>
            @if (maySet()) {
              <select
                class="choice"
                [attr.aria-label]="'Role of ' + member.name"
                (change)="setRole(member, $event)"
              >
                @for (role of roles; track role) {
                  <option [value]="role" [selected]="role === member.role">{{ words[role] }}</option>
                }
              </select>
              <button
                type="button"
                class="link"
                [attr.aria-label]="'Remove ' + member.name + ' from the product'"
                (click)="remove(member)"
              >
                Remove
              </button>
            } @else {
              <span>{{ words[member.role] }}</span>
            }
          </li>
        }
      </ul>
      @if (maySet()) {
        <app-add-member [people]="others()" (added)="add($event.personId, $event.role)" />
      }
    </div>
  `,
  styles: `
    ul {
      margin-top: 0.5rem;
      border-top: 1px solid var(--rule);
    }
    li {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.25rem 1rem;
      padding: 0.5rem 0;
      border-bottom: 1px solid var(--rule);
    }
    .who {
      display: grid;
      flex: 1 1 10rem;
      min-width: 0;
      overflow-wrap: anywhere;
    }
    app-add-member {
      display: block;
      margin-top: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MembersPanel {
  readonly productId = input.required<string>();

  private readonly api = inject(Api);
  private readonly notices = inject(Notices);

  protected readonly maySet = inject(Session).isAdministrator;
  protected readonly roles = PRODUCT_ROLES;
  protected readonly words = ROLE_WORDS;
  protected readonly members = loaded(() => this.path(), listOf(memberSchema), 'the people of this product');
  private readonly directory = loaded(
    () => (this.maySet() ? '/api/people/directory' : undefined),
    listOf(directoryEntrySchema),
    'the people of the organisation',
  );
  protected readonly others = computed(() => {
    const members = new Set(this.members.value()?.map(({ personId }) => personId));
    return (this.directory.value() ?? []).filter(({ id }) => !members.has(id));
  });

  protected async setRole(member: Member, event: Event): Promise<void> {
    const role = event.target instanceof HTMLSelectElement ? event.target.value : '';
    const known = PRODUCT_ROLES.find((candidate) => candidate === role);
    if (known !== undefined) await this.put(member.personId, known, `${member.name} is ${known} now.`);
  }

  protected async add(personId: string, role: ProductRole): Promise<void> {
    await this.put(personId, role, 'Added.');
  }

  protected async remove(member: Member): Promise<void> {
    const path = `${this.path()}/${member.personId}`;
    await this.notices.during(
      () => this.api.act('DELETE', path),
      `${member.name} has no role here any more.`,
    );
    this.members.reload();
  }

  private async put(personId: string, role: ProductRole, done: string): Promise<void> {
    await this.notices.during(() => this.api.act('PUT', `${this.path()}/${personId}`, { role }), done);
    this.members.reload();
  }

  private path(): string {
    return `/api/products/${this.productId()}/members`;
  }
}
