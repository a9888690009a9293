import { ChangeDetectionStrategy, Component } from '@angular/core';
import { pageHead } from '../core/page';
import { Failed, type Failure } from '../ui/states';

@Component({
  selector: 'app-forbidden',
  imports: [Failed],
  template: ` <app-failed [failure]="failure" [page]="true" /> `,
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
