import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { isSecondOrder, type CustomMachine, type TemplateId } from '../../../../shared/contracts';
import { drawingOf } from '../../../../shared/machines';
import { drawnParts } from './drawn-parts';
import { SymbolText } from './symbol-text';

/** The machine with its symbols: a template's own picture, or the plain list of a custom machine's coordinates. */
@Component({
  selector: 'app-machine-drawing',
  imports: [SymbolText],
  template: `
    @if (drawing(); as drawing) {
      <svg
        role="img"
        [attr.viewBox]="'0 0 ' + drawing.width + ' ' + drawing.height"
        [attr.aria-label]="drawing.description"
      >
        @for (stroke of parts().strokes; track $index) {
          <path [attr.d]="stroke.path" [attr.class]="stroke.style" />
        }
        @for (symbol of parts().symbols; track $index) {
          <text [attr.x]="symbol.at[0]" [attr.y]="symbol.at[1] + 4" [class.quiet]="symbol.quiet">
            <tspan class="base">{{ symbol.base }}</tspan>
            @if (symbol.below !== '') {
              <tspan class="below" dy="3">{{ symbol.below }}</tspan>
            }
          </text>
        }
      </svg>
    } @else {
      <ol [attr.aria-label]="listLabel()">
        @for (name of names(); track $index) {
          <li><app-symbol [symbol]="name" /></li>
        }
      </ol>
    }
  `,
  styleUrl: './machine-drawing.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachineDrawing {
  readonly template = input<TemplateId>();
  readonly custom = input<CustomMachine>();

  protected readonly drawing = computed(() => {
    const template = this.template();
    return template === undefined ? undefined : drawingOf(template);
  });
  protected readonly parts = computed(() => {
    const drawing = this.drawing();
    return drawing === undefined ? { strokes: [], symbols: [] } : drawnParts(drawing);
  });
  protected readonly names = computed(() => {
    const machine = this.custom();
    if (machine === undefined) return [];
    return isSecondOrder(machine) ? machine.coordinates : machine.states;
  });
  protected readonly listLabel = computed(() => {
    const machine = this.custom();
    return machine !== undefined && isSecondOrder(machine) ? 'Coordinates' : 'States';
  });
}
