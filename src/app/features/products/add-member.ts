import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { PRODUCT_ROLES, type ProductRole } from '../../../../shared/contracts/api';
import { ROLE_WORDS } from '../../core/answers';

@Component({
  selector: 'app-add-member',
  imports: [ReactiveFormsModule],
  template: `
    @if (people().length > 0) {
      <form class="acts" [formGroup]="form" (ngSubmit)="add()">
        <select class="choice" aria-label="Person to add" formControlName="personId">
          <option value="">Choose a person</option>
          @for (person of people(); track person.id) {
            <option [value]="person.id">{{ person.name }}, {{ person.email }}</option>
          }
        </select>
        <select class="choice" aria-label="Role of the person to add" formControlName="role">
          @for (role of roles; track role) {
            <option [value]="role">{{ words[role] }}</option>
          }
        </select>
        <button type="submit" class="button" [attr.aria-disabled]="form.controls.personId.value === ''">
          Add to the product
        </button>
      </form>
    }
  `,
  styles: `
    .choice {
      max-width: 100%;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AddMember {
  readonly people = input.required<readonly { id: string; name: string; email: string }[]>();
  readonly added = output<{ personId: string; role: ProductRole }>();

  protected readonly roles = PRODUCT_ROLES;
  protected readonly words = ROLE_WORDS;
  protected readonly form = new FormGroup({
    personId: new FormControl('', { nonNullable: true }),
    role: new FormControl<ProductRole>('viewer', { nonNullable: true }),
  });

  protected add(): void {
    const chosen = this.form.getRawValue();
    if (chosen.personId === '') return;
    this.added.emit(chosen);
    this.form.reset();
  }
}
