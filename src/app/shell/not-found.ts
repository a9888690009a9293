import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { pageHead } from '../core/page';
import { Empty } from '../ui/states';

@Component({
  selector: 'app-not-found',
  imports: [Empty, RouterLink],
  template: `
    <div class="page page-narrow">
      <h1 class="unseen">Not found</h1>
      <app-empty title="There is no such page">
        Check the address, or start from the products.
        <a class="button" routerLink="/products">Go to products</a>
      </app-empty>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFound {
  constructor() {
    pageHead(() => ({ title: 'Not found', trail: [] }));
  }
}
