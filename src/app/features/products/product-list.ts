import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { productSchema, type Product } from '../../../../shared/contracts/api';
import { ROLE_WORDS } from '../../core/answers';
import { listOf, loaded } from '../../core/api';
import { pageHead } from '../../core/page';
import { Session } from '../../core/session';
import { MomentView } from '../../core/words';
import { Empty, WhenLoaded } from '../../ui/states';
import { ProductDialog } from './product-dialog';

@Component({
  selector: 'app-product-list',
  imports: [Empty, MomentView, RouterLink, WhenLoaded],
  template: `
    <div class="page">
      <div class="page-head">
        <h1>Products</h1>
        @if (session.mayCreateProducts()) {
          <button type="button" class="button main" (click)="create()">New product</button>
        }
      </div>
      <div
        class="sheet"
        *appWhenLoaded="products; let products; let renewing = renewing"
        [class.renewing]="renewing"
      >
        @if (products.length === 0) {
          @if (session.mayCreateProducts()) {
            <app-empty title="No product yet">
              Start with a product, such as a lift table. Its variants and their payloads go into it.
              <button type="button" class="button main" (click)="create()">New product</button>
            </app-empty>
          } @else {
            <app-empty title="No product yet">
              You have no role in any product. Ask an administrator for one.
            </app-empty>
          }
        } @else {
          <table class="table padded stacks">
            <thead>
              <tr>
                <th scope="col">Product</th>
                <th scope="col">What it is</th>
                <th scope="col" class="number">Variants</th>
                <th scope="col">Your role</th>
                <th scope="col">Changed</th>
              </tr>
            </thead>
            <tbody>
              @for (product of products; track product.id) {
                <tr>
                  <th scope="row">
                    <a class="name" [routerLink]="['/products', product.id]">{{ product.name }}</a>
                  </th>
                  <td class="second description">{{ product.description }}</td>
                  <td class="number" data-label="Variants">{{ product.variants }}</td>
                  <td data-label="Your role">{{ roleOf(product) }}</td>
                  <td data-label="Changed"><app-moment [at]="product.changedAt" /></td>
                </tr>
              }
            </tbody>
          </table>
        }
      </div>
    </div>
  `,
  styles: `
    .name {
      font-size: 1.0625rem;
      font-stretch: 75%;
      font-weight: 680;
      text-decoration: none;
    }
    .name:hover {
      text-decoration: underline;
    }
    .description {
      width: 46%;
    }
    @media (max-width: 40rem) {
      .description {
        width: auto;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductList {
  protected readonly session = inject(Session);
  private readonly dialogs = inject(MatDialog);
  private readonly router = inject(Router);

  protected readonly products = loaded(() => '/api/products', listOf(productSchema), 'the products');

  constructor() {
    pageHead(() => ({ title: 'Products', trail: [] }));
  }

  protected roleOf(product: Product): string {
    return product.role === null ? 'None' : ROLE_WORDS[product.role];
  }

  protected async create(): Promise<void> {
    const dialog = this.dialogs.open<ProductDialog, Product | undefined, Product>(ProductDialog, {
      width: '30rem',
    });
    const product = await firstValueFrom(dialog.afterClosed());
    if (product !== undefined) await this.router.navigate(['/products', product.id]);
  }
}
