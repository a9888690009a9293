import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The first load of a page, before there is an old value to keep. */
@Component({
  selector: 'app-waiting',
  template: `
    <div class="running-line"></div>
    <p role="status" class="second">{{ text() }}</p>
  `,
  styles: `
    :host {
      display: block;
      padding: 1rem 0 2rem;
    }
    p {
      margin: 0.75rem 1.25rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Waiting {
  readonly text = input('Loading …');
}
