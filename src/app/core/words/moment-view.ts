import { ChangeDetectionStrategy, Component, booleanAttribute, computed, input } from '@angular/core';
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

  /** It stands within a sentence: "today 12:04". */
  readonly inSentence = input(false, { transform: booleanAttribute });

  protected readonly text = computed(() => {
    const text = momentText(this.at());
    return this.inSentence() ? text.replace(/^(?:To|Yester)/, (start) => start.toLowerCase()) : text;
  });
  protected readonly exact = computed(() => new Date(this.at()).toLocaleString('en-GB'));
}
