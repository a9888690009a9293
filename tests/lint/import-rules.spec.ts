import { afterAll, describe, expect, it } from 'vitest';
import { ProjectOnPaper } from './project-on-paper';

const files = [
  'shared/units/convert.ts',
  'shared/expressions/parse.ts',
  'shared/expressions/elementary/sine.ts',
  'shared/contracts/study.ts',
  'shared/machines/two-mass-drive.ts',
  'shared/engine/sweep/search.ts',
  'server/app.ts',
  'server/platform/log.ts',
  'server/db/client.ts',
  'server/policies/access.ts',
  'server/features/runs/index.ts',
  'server/features/runs/runs.repository.ts',
  'server/features/reviews/index.ts',
  'server/features/reviews/reviews.usecases.ts',
  'server/jobs/index.ts',
  'server/jobs/queue.ts',
  'server/jobs/worker/run.ts',
  'server/commands/study.ts',
  'src/app/core/session.ts',
  'src/app/ui/heat-map/heat-map.ts',
  'src/app/forms/fields.ts',
  'src/app/engine/client.ts',
  'src/app/engine/worker/answer.ts',
  'src/app/features/reviews/review-page.ts',
  'src/app/features/products/product-list.ts',
  'src/app/features/scenario/scenario-store.ts',
  'src/app/shell/frame.ts',
  'tests/reference/machines.ts',
];

const project = new ProjectOnPaper(files);
afterAll(() => project.discard());

const importRule = 'boundaries/dependencies';

describe('imports that the table forbids', () => {
  it.each([
    ['shared/units/convert.ts', '../expressions/parse'],
    ['shared/units/convert.ts', 'zod'],
    ['shared/expressions/parse.ts', '../contracts/study'],
    ['shared/expressions/parse.ts', 'vitest'],
    ['shared/contracts/study.ts', '../engine/sweep/search'],
    ['shared/contracts/study.ts', 'ml-matrix'],
    ['shared/machines/two-mass-drive.ts', '../engine/sweep/search'],
    ['shared/machines/two-mass-drive.ts', 'zod'],
    ['shared/engine/sweep/search.ts', 'node:fs'],
    ['shared/engine/sweep/search.ts', 'fs'],
    ['shared/engine/sweep/search.ts', 'zod'],
    ['shared/engine/sweep/search.ts', 'fast-check'],
    ['shared/engine/sweep/search.ts', '../../../server/platform/log'],
    ['shared/engine/sweep/search.ts', '../../../tests/reference/machines'],
    ['shared/engine/sweep/search.spec.ts', 'node:fs'],
    ['server/policies/access.ts', '../db/client'],
    ['server/policies/access.ts', 'express'],
    ['server/platform/log.ts', '../db/client'],
    ['server/db/client.ts', '../features/runs/index'],
    ['server/features/runs/runs.usecases.ts', '../../../shared/engine/sweep/search'],
    ['server/features/runs/runs.usecases.ts', '../reviews/reviews.usecases'],
    ['server/features/runs/runs.usecases.ts', '../../jobs/queue'],
    ['server/features/runs/runs.usecases.ts', '../../app'],
    ['server/features/runs/runs.usecases.ts', '../../commands/study'],
    ['server/jobs/queue.ts', '../../shared/engine/sweep/search'],
    ['server/jobs/queue.ts', '../features/runs'],
    ['server/jobs/queue.ts', './worker/run'],
    ['server/app.ts', './commands/study'],
    ['server/app.ts', './features/runs/runs.repository'],
    ['server/app.ts', '../src/app/core/session'],
    ['server/commands/study.ts', 'zod'],
    ['server/commands/study.ts', '../features/runs/runs.repository'],
    ['server/commands/study.ts', '../../tests/reference/machines'],
    ['src/app/core/session.ts', '../../../server/platform/log'],
    ['src/app/core/session.ts', '../../../shared/engine/sweep/search'],
    ['src/app/core/session.ts', 'node:fs'],
    ['src/app/ui/heat-map/heat-map.ts', '../../core/session'],
    ['src/app/ui/heat-map/heat-map.ts', '../../../../shared/contracts/study'],
    ['src/app/forms/fields.ts', '../core/session'],
    ['src/app/engine/client.ts', '../../../shared/engine/sweep/search'],
    ['src/app/features/reviews/review-page.ts', '../products/product-list'],
    ['src/app/features/reviews/review-page.ts', '../../../../shared/engine/sweep/search'],
    ['src/app/features/reviews/review-page.ts', '../../engine/worker/answer'],
    ['src/app/shell/frame.ts', '../features/products/product-list'],
    ['src/main.ts', '../server/app'],
  ])('%s does not import %s', async (file, source) => {
    for (const text of [
      `export * from '${source}';`,
      `import '${source}';`,
      `import type { Thing } from '${source}';\nexport type Other = Thing;`,
      `export const later = () => import('${source}');`,
    ]) {
      expect(await project.brokenRules(file, `${text}\n`)).toEqual([importRule]);
    }
  });

  it('are not hidden in the type of an import, which the table does not see', async () => {
    const text = "export type Hidden = typeof import('../../engine/sweep/search');\n";
    expect(await project.brokenRules('shared/contracts/study.ts', text)).toEqual([
      '@typescript-eslint/consistent-type-imports',
    ]);
  });
});

describe('imports that the table allows', () => {
  it.each([
    ['shared/expressions/parse.ts', '../units/convert'],
    ['shared/expressions/parse.ts', './elementary/sine'],
    ['shared/contracts/study.ts', '../expressions/parse'],
    ['shared/contracts/study.ts', 'zod'],
    ['shared/machines/two-mass-drive.ts', '../contracts/study'],
    ['shared/engine/sweep/search.ts', '../../expressions/elementary/sine'],
    ['shared/engine/sweep/search.ts', '../../machines/two-mass-drive'],
    ['shared/engine/sweep/search.ts', '../../contracts/study'],
    ['shared/engine/sweep/search.ts', 'ml-matrix'],
    ['shared/engine/sweep/search.spec.ts', 'vitest'],
    ['shared/units/convert.spec.ts', 'fast-check'],
    ['server/policies/access.ts', '../../shared/contracts/study'],
    ['server/platform/log.ts', 'pino'],
    ['server/db/client.ts', '../platform/log'],
    ['server/features/runs/runs.usecases.ts', './runs.repository'],
    ['server/features/runs/runs.usecases.ts', '../../policies/access'],
    ['server/features/runs/runs.usecases.ts', '../../jobs'],
    ['server/features/runs/runs.usecases.ts', '../reviews'],
    ['server/jobs/worker/run.ts', '../../../shared/engine/sweep/search'],
    ['server/app.ts', './features/runs'],
    ['server/app.ts', './jobs'],
    ['server/commands/study.ts', '../../shared/engine/sweep/search'],
    ['server/commands/study.ts', 'node:fs'],
    ['server/commands/start.ts', '../app'],
    ['src/app/ui/heat-map/heat-map.ts', '../../../../shared/units/convert'],
    ['src/app/ui/heat-map/heat-map.ts', 'd3'],
    ['src/app/core/session.ts', '@angular/core'],
    ['src/app/core/session.ts', '@angular/common/http'],
    ['src/app/core/session.ts', 'rxjs/operators'],
    ['src/app/forms/fields.ts', '@ngx-formly/core'],
    ['src/app/engine/worker/answer.ts', '../../../../shared/engine/sweep/search'],
    ['src/app/features/reviews/review-page.ts', '../../engine/client'],
    ['src/app/features/reviews/review-page.ts', '../../ui/heat-map/heat-map'],
    ['src/app/features/scenario/map/map-page.ts', '../scenario-store'],
    ['src/app/shell/frame.ts', '../core/session'],
    ['src/main.ts', './app/shell/frame'],
    ['tests/reference/cart.spec.ts', '../../shared/engine/sweep/search'],
  ])('%s imports %s', async (file, source) => {
    expect(await project.brokenRules(file, `export * from '${source}';\n`)).toEqual([]);
  });
});

it('has no place for a file outside the known folders', async () => {
  expect(await project.brokenRules('shared/helpers/all-sorts.ts', 'export {};\n')).toEqual([
    'boundaries/no-unknown-files',
  ]);
});
