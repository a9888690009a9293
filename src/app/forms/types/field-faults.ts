import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Description } from '../description';
import type { FieldValue } from '../fields/study-field';
import { expressionFault } from '../values/expression-fault';

/** What is wrong with one field, in words under it; for an expression the character that caused it is marked. */
@Component({
  selector: 'app-field-faults',
  template: `
    @if (marked(); as marked) {
      <p class="written" aria-hidden="true">
        {{ marked.before }}<span class="at">{{ marked.at }}</span
        >{{ marked.after }}
      </p>
      <p>{{ place() }}{{ marked.message }} (character {{ marked.position + 1 }}).</p>
    } @else {
      @for (message of messages(); track $index) {
        <p>{{ label() }} {{ message }}.</p>
      }
    }
  `,
  styles: `
    :host {
      display: block;
      font-size: 0.75rem;
      line-height: 1rem;
    }
    p {
      margin: 0.125rem 0 0.25rem;
      padding-left: 0.5rem;
      border-left: 3px solid var(--ink);
      font-weight: 600;
    }
    .written {
      margin-bottom: 0;
      padding-bottom: 0.4375rem;
      overflow-x: auto;
      font-weight: 400;
      white-space: pre;
    }
    .at {
      position: relative;
      border-bottom: 2px solid var(--ink);
      font-weight: 700;
    }
    .at::after {
      content: '';
      position: absolute;
      top: calc(100% + 3px);
      left: calc(50% - 4px);
      border: 4px solid transparent;
      border-top: 0;
      border-bottom: 5px solid var(--ink);
    }
    :host(:empty) {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FieldFaults {
  private readonly description = inject(Description);
  readonly path = input.required<string | undefined>();
  readonly value = input.required<FieldValue>();
  readonly label = input.required<string>();
  /** Where the field stands, when that is not told by the place of the message. */
  readonly place = input('');
  /** A text that is no expression has no character to mark. */
  readonly expression = input(true);

  protected readonly marked = computed(() => {
    const text = this.value();
    if (!this.expression() || typeof text !== 'string') return undefined;
    const fault = expressionFault(text, this.description.values().names);
    if (fault === undefined) return undefined;
    const { message, position } = fault;
    const before = text.slice(0, position);
    return {
      message,
      position,
      before,
      at: text.charAt(position) || '\u00a0',
      after: text.slice(position + 1),
    };
  });

  protected readonly messages = computed(() => {
    const path = this.path();
    return path === undefined ? [] : this.description.problems().at(path);
  });
}
