import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { symbolParts } from './symbol-parts';

/** A symbol in italics with its index set below. */
@Component({
  selector: 'app-symbol',
  template: `<i>{{ parts().base }}</i>
    @if (parts().below; as below) {
      <sub>{{ below }}</sub>
    }`,
  styles: `
    :host {
      white-space: nowrap;
    }
    i {
      font-style: italic;
      font-weight: 600;
    }
    sub {
      font-size: 0.75em;
      line-height: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SymbolText {
  readonly symbol = input.required<string>();
  protected readonly parts = computed(() => symbolParts(this.symbol()));
}
