import { ChangeDetectionStrategy, Component } from '@angular/core';
import { pageHead } from '../core/page';
import { Failed, type Failure } from '../ui/states';

@Component({
  selector: 'app-forbidden',
  imports: [Failed],
  template: `
    <div class="page page-narrow">
      <h1 class="unseen">Not for your role</h1>
      <app-failed [failure]="failure" />
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Forbidden {
  protected readonly failure: Failure = {
    kind: 'forbidden',
    title: 'This page is for administrators',
    detail: 'Ask an administrator to do it for you, or to make you one.',
  };

  constructor() {
    pageHead(() => ({ title: 'Not for your role', trail: [] }));
  }
}
