import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { SortOrder } from './sort-order';

/** A column head that sorts: `<th appSortHeader="reserve" [order]="order()" (sortBy)="sortBy($event)">`. */
@Component({
  selector: 'th[appSortHeader]',
  template: `
    <button type="button" (click)="sort()">
      <ng-content />
      <svg width="8" height="10" viewBox="0 0 8 10" aria-hidden="true" [class.chosen]="chosen()">
        <path [attr.d]="chosen() && order().falling ? 'M1 6l3 3.4L7 6z' : 'M1 4l3-3.4L7 4z'" />
      </svg>
    </button>
  `,
  styles: `
    button {
      display: inline-flex;
      align-items: center;
      gap: 0.25rem;
      padding: 0;
      border: 0;
      background: none;
      cursor: pointer;
    }
    svg {
      fill: transparent;
    }
    button:hover svg {
      fill: var(--edge);
    }
    svg.chosen {
      fill: var(--ink);
    }
  `,
  host: { scope: 'col', '[attr.aria-sort]': 'ariaSort()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SortHeader {
  readonly appSortHeader = input.required<string>();
  readonly order = input.required<SortOrder>();
  /** Where the first press sorts falling: the largest value matters first. */
  readonly fallingFirst = input(false);
  readonly sortBy = output<SortOrder>();

  protected readonly chosen = computed(() => this.order().column === this.appSortHeader());
  protected readonly ariaSort = computed(() =>
    this.chosen() ? (this.order().falling ? 'descending' : 'ascending') : null,
  );

  protected sort(): void {
    const falling = this.chosen() ? !this.order().falling : this.fallingFirst();
    this.sortBy.emit({ column: this.appSortHeader(), falling });
  }
}
