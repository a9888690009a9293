import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { productDraftSchema, productSchema, type Product } from '../../../../shared/contracts/api';
import { Api } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { DialogFrame } from '../../ui/dialog';
import { TextField } from '../../ui/form';

/** Makes a product, or changes the name and description of the one it is given. */
@Component({
  selector: 'app-product-dialog',
  imports: [DialogFrame, ReactiveFormsModule, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <app-dialog-frame [title]="product ? 'Change product' : 'New product'">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field label="Name" [control]="form.controls.name" />
        <app-text-field
          label="Description"
          hint="What it carries, and where"
          [lines]="3"
          [control]="form.controls.description"
        />
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          {{ product ? 'Save' : 'Create product' }}
        </button>
      </app-dialog-frame>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductDialog {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<ProductDialog, Product>>(MatDialogRef);

  protected readonly product = inject<Product | null>(MAT_DIALOG_DATA);
  protected readonly form = new FormGroup({
    name: new FormControl(this.product?.name ?? '', {
      nonNullable: true,
      validators: validBy(productDraftSchema.shape.name),
    }),
    description: new FormControl(this.product?.description ?? '', {
      nonNullable: true,
      validators: validBy(productDraftSchema.shape.description),
    }),
  });
  protected readonly submission = submission(this.form);

  protected async save(): Promise<void> {
    await this.submission.send(async () => {
      const draft = productDraftSchema.parse(this.form.getRawValue());
      const saved =
        this.product === null
          ? await this.api.send('POST', '/api/products', productSchema, draft)
          : await this.api.send('PATCH', `/api/products/${this.product.id}`, productSchema, draft);
      this.dialog.close(saved);
    });
  }
}
