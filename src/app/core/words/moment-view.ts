import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { momentText } from './moment';

/** An instant in words, the exact one in its title. */
@Component({
  selector: 'app-moment',
  template: `<time [attr.datetime]="at()" [title]="exact()">{{ text() }}</time>`,
  styles: `
    time {
      white-space: nowrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MomentView {
  readonly at = input.required<string>();

  protected readonly text = computed(() => momentText(this.at()));
  protected readonly exact = computed(() => new Date(this.at()).toLocaleString('en-GB'));
}
