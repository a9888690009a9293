import { ChangeDetectionStrategy, Component, computed, effect, inject } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, Router } from '@angular/router';
import { firstValueFrom, map } from 'rxjs';
import { productSchema, variantSchema, type Product, type Variant } from '../../../../shared/contracts/api';
import { Cautions, mayDesign } from '../../core/answers';
import { Api, listOf, loaded } from '../../core/api';
import { RunEvents } from '../../core/events';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { confirm } from '../../ui/dialog';
import { Empty, WhenLoaded } from '../../ui/states';
import { readSortOrder, writeSortOrder, type SortOrder } from '../../ui/table';
import { LadderTable } from './ladder/ladder-table';
import { MembersPanel } from './members-panel';
import { NewNamedStudy, type NewNamedStudyData } from './new-named-study';
import { ProductDialog } from './product-dialog';

const FIRST_ORDER: SortOrder = { column: 'variant', falling: false };

@Component({
  selector: 'app-product',
  imports: [Cautions, Empty, LadderTable, MembersPanel, WhenLoaded],
  templateUrl: './product-page.html',
  styles: `
    .foot {
      display: grid;
      grid-template-columns: minmax(0, 2fr) minmax(0, 1fr);
      gap: 2rem 1.75rem;
      margin-top: 2.25rem;
    }
    .description {
      margin: -0.5rem 0 1.125rem;
    }
    @media (max-width: 60rem) {
      .foot {
        grid-template-columns: minmax(0, 1fr);
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProductPage {
  private readonly api = inject(Api);
  private readonly dialogs = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  protected readonly productId = toSignal(
    this.route.paramMap.pipe(map((params) => params.get('productId') ?? '')),
    { requireSync: true },
  );
  protected readonly order = toSignal(
    this.route.queryParamMap.pipe(map((query) => readSortOrder(query.get('sort'), FIRST_ORDER))),
    { requireSync: true },
  );
  protected readonly product = loaded(
    () => `/api/products/${this.productId()}`,
    productSchema,
    'this product',
  );
  protected readonly variants = loaded(
    () => `/api/products/${this.productId()}/variants`,
    listOf(variantSchema),
    'the variants of this product',
  );
  protected readonly mayDesign = computed(() => mayDesign(this.product.value()?.role));
  protected readonly approximated = computed(
    () =>
      this.variants.value()?.some(({ scenarios }) => scenarios.some(({ run }) => run?.approximated)) === true,
  );

  constructor() {
    pageHead(() => {
      const name = this.product.value()?.name ?? '';
      return { title: name, trail: [{ label: 'Products', path: '/products' }, { label: name }] };
    });
    const events = inject(RunEvents);
    events.events.pipe(takeUntilDestroyed()).subscribe(({ kind, scenarioId }) => {
      if (kind !== 'progress' && this.shows(scenarioId)) this.variants.reload();
    });
    // After a gap in the stream what happened meanwhile is asked for.
    let heard = events.live();
    effect(() => {
      const live = events.live();
      if (live && !heard && this.variants.value() !== undefined) this.variants.reload();
      heard = live;
    });
  }

  protected count(variants: readonly Variant[]): string {
    if (variants.length === 0) return '';
    return `${variants.length} ${variants.length === 1 ? 'variant' : 'variants'}, rated range against proved range`;
  }

  protected async sortBy(order: SortOrder): Promise<void> {
    const sort = writeSortOrder(order);
    await this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { sort: sort === writeSortOrder(FIRST_ORDER) ? null : sort },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected createVariant(): void {
    const data: NewNamedStudyData = {
      title: 'New variant',
      nameLabel: 'Name of the variant',
      act: 'Create variant',
      scenarios: [],
      save: async (name, study) => {
        const path = `/api/products/${this.productId()}/variants`;
        const variant = await this.api.send('POST', path, variantSchema, { name, study });
        await this.router.navigate(['/variants', variant.id]);
      },
    };
    this.dialogs.open(NewNamedStudy, { data, width: '30rem' });
  }

  protected async change(product: Product): Promise<void> {
    const dialog = this.dialogs.open<ProductDialog, Product, Product>(ProductDialog, {
      data: product,
      width: '30rem',
    });
    const changed = await firstValueFrom(dialog.afterClosed());
    if (changed !== undefined) this.product.replace(changed);
  }

  protected async remove(product: Product): Promise<void> {
    const sure = await confirm(this.dialogs, {
      title: `Delete ${product.name}?`,
      text: 'Its variants, scenarios and runs go with it and cannot be brought back.',
      act: 'Delete product',
    });
    if (!sure) return;
    const done = await this.notices.during(
      () => this.api.act('DELETE', `/api/products/${product.id}`),
      `${product.name} is deleted.`,
    );
    if (done) await this.router.navigate(['/products']);
  }

  private shows(scenarioId: string): boolean {
    return (
      this.variants.value()?.some(({ scenarios }) => scenarios.some(({ id }) => id === scenarioId)) === true
    );
  }
}
