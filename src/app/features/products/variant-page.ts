import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, Router } from '@angular/router';
import { map } from 'rxjs';
import {
  productSchema,
  runSchema,
  scenarioSchema,
  variantSchema,
  type Variant,
} from '../../../../shared/contracts/api';
import { Cautions, mayDesign } from '../../core/answers';
import { Api, loaded } from '../../core/api';
import { RunEvents } from '../../core/events';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { confirm } from '../../ui/dialog';
import { Empty, WhenLoaded } from '../../ui/states';
import { NewNamedStudy, type NewNamedStudyData } from './new-named-study';
import { RenameDialog, type RenameData } from './rename-dialog';
import { ScenarioTable, type ListedScenario } from './scenario-table';

@Component({
  selector: 'app-variant',
  imports: [Cautions, Empty, ScenarioTable, WhenLoaded],
  templateUrl: './variant-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VariantPage {
  private readonly api = inject(Api);
  private readonly dialogs = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  private readonly variantId = toSignal(
    inject(ActivatedRoute).paramMap.pipe(map((params) => params.get('variantId') ?? '')),
    { requireSync: true },
  );
  protected readonly variant = loaded(
    () => `/api/variants/${this.variantId()}`,
    variantSchema,
    'this variant',
  );
  private readonly product = loaded(
    () => this.variant.value() && `/api/products/${this.variant.value()?.productId}`,
    productSchema,
    'this product',
  );
  protected readonly mayDesign = computed(() => mayDesign(this.product.value()?.role));
  protected readonly approximated = computed(
    () => this.variant.value()?.scenarios.some(({ run }) => run?.approximated) === true,
  );

  constructor() {
    pageHead(() => {
      const variant = this.variant.value();
      const product = this.product.value();
      return {
        title: variant?.name ?? '',
        trail: [
          { label: 'Products', path: '/products' },
          ...(product === undefined ? [] : [{ label: product.name, path: `/products/${product.id}` }]),
          { label: variant?.name ?? '' },
        ],
      };
    });
    inject(RunEvents)
      .events.pipe(takeUntilDestroyed())
      .subscribe(({ kind, scenarioId }) => {
        const shown = this.variant.value()?.scenarios.some(({ id }) => id === scenarioId);
        if (kind !== 'progress' && shown === true) this.variant.reload();
      });
  }

  protected async run(scenario: ListedScenario): Promise<void> {
    const path = `/api/scenarios/${scenario.id}/revisions/${scenario.revision}/runs`;
    await this.notices.during(async () => {
      await this.api.send('POST', path, runSchema);
    }, `${scenario.name} runs.`);
    this.variant.reload();
  }

  protected createScenario(variant: Variant): void {
    const data: NewNamedStudyData = {
      title: 'New scenario',
      nameLabel: 'Name of the scenario',
      act: 'Create scenario',
      scenarios: variant.scenarios,
      save: async (name, study) => {
        const path = `/api/variants/${variant.id}/scenarios`;
        const scenario = await this.api.send('POST', path, scenarioSchema, { name, study });
        await this.router.navigate(['/scenarios', scenario.id]);
      },
    };
    this.dialogs.open(NewNamedStudy, { data, width: '30rem' });
  }

  protected duplicate(variant: Variant): void {
    const data: RenameData = {
      title: 'Duplicate variant',
      act: 'Duplicate',
      name: `${variant.name}, copy`,
      save: async (name) => {
        const path = `/api/variants/${variant.id}/duplicate`;
        const copy = await this.api.send('POST', path, variantSchema, { name });
        await this.router.navigate(['/variants', copy.id]);
      },
    };
    this.dialogs.open(RenameDialog, { data, width: '26rem' });
  }

  protected rename(variant: Variant): void {
    const data: RenameData = {
      title: 'Rename variant',
      act: 'Rename',
      name: variant.name,
      save: async (name) => {
        await this.api.act('PATCH', `/api/variants/${variant.id}`, { name });
        this.variant.reload();
      },
    };
    this.dialogs.open(RenameDialog, { data, width: '26rem' });
  }

  protected async remove(variant: Variant): Promise<void> {
    const sure = await confirm(this.dialogs, {
      title: `Delete ${variant.name}?`,
      text: 'Its scenarios and runs go with it and cannot be brought back.',
      act: 'Delete variant',
    });
    if (!sure) return;
    const done = await this.notices.during(
      () => this.api.act('DELETE', `/api/variants/${variant.id}`),
      `${variant.name} is deleted.`,
    );
    if (done) await this.router.navigate(['/products', variant.productId]);
  }
}
