import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { studyChanges } from './study-changes';

const MOST_CHANGES = 8;

/** Where one study differs from another, the first few places of it. */
@Component({
  selector: 'app-change-list',
  template: `
    <ul>
      @for (change of changes(); track change.path) {
        <li>
          <strong>{{ change.path }}</strong>: {{ change.before ?? 'nothing' }} →
          {{ change.after ?? 'nothing' }}
        </li>
      } @empty {
        <li>nothing in the study</li>
      }
      @if (more() > 0) {
        <li>and {{ more() }} more</li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0.375rem 0;
      font-weight: 400;
      overflow-wrap: anywhere;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChangeList {
  readonly before = input.required<unknown>();
  readonly after = input.required<unknown>();

  private readonly all = computed(() => studyChanges(this.before(), this.after()));
  protected readonly changes = computed(() => this.all().slice(0, MOST_CHANGES));
  protected readonly more = computed(() => this.all().length - this.changes().length);
}
