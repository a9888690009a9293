import { variantSchema } from '../../../shared/contracts/api';
import type { TestPerson } from '../../api/support/test-people';
import { exampleStudy } from '../../commands/support/example-studies';
import type { Site } from './site';

/** The people of one product that has one variant, with one scenario, made from an example. */
export interface SiteTeam {
  readonly designer: TestPerson;
  readonly secondDesigner: TestPerson;
  readonly reviewer: TestPerson;
  readonly viewer: TestPerson;
  readonly productId: string;
  readonly variantId: string;
  readonly scenarioId: string;
}

export async function makeTeam(site: Site, variantName: string, example: string): Promise<SiteTeam> {
  const designer = await site.person({ name: 'Dora Designer' });
  const secondDesigner = await site.person({ name: 'Sven Second' });
  const reviewer = await site.person({ name: 'Rita Reviewer' });
  const viewer = await site.person({ name: 'Vito Viewer' });
  const productId = await site.product(designer, [
    [designer, 'designer'],
    [secondDesigner, 'designer'],
    [reviewer, 'reviewer'],
    [viewer, 'viewer'],
  ]);
  const body = { name: variantName, study: exampleStudy(example) };
  const variant = (await designer.post(`/api/products/${productId}/variants`, body)).read(variantSchema);
  return {
    ...{ designer, secondDesigner, reviewer, viewer, productId },
    variantId: variant.id,
    scenarioId: variant.scenarios[0].id,
  };
}
