import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** What a proof does not cover. Shown wherever people could rely on an answer. */
@Component({
  selector: 'app-cautions',
  template: `
    <h2>Cautions</h2>
    <ul>
      @for (caution of cautions(); track caution) {
        <li>{{ caution }}</li>
      }
    </ul>
  `,
  styles: `
    :host {
      display: block;
    }
    ul {
      display: grid;
      gap: 0.375rem;
      margin-top: 0.5rem;
      color: var(--ink-second);
    }
    li {
      max-width: 68ch;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Cautions {
  /** A delay or sampling is in the loop, in its Padé form. */
  readonly approximated = input(false);

  protected readonly cautions = computed(() => [
    'Proved means proved for the linear model as described, near one operating point, computed in double precision.',
    ...(this.approximated()
      ? ['The delay enters by its Padé form: the word is “proved for the approximated delay”.']
      : []),
    'Each parameter is taken as constant during a motion. Changing rope, height or speed and moving loads are not covered.',
    'Saturation, backlash, dry friction, slip, impacts and faults are not covered.',
    'Verify on the machine at light, rated and over-load before release.',
    'The rated payload and its test factors are set under the applicable standards, such as ISO 12100 and EN 1570-1 for lifting tables, and local codes, by qualified engineers.',
  ]);
}
