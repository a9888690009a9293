import { recordInAudit, type Seed, type Tx } from '../../db';
import { readArrivingStudy } from '../../platform/arriving-study';
import { createPasswords, type Passwords } from '../auth';
import { insertPerson } from '../people';
import { createProduct, setMember } from '../products';
import { requestRun } from '../runs';
import { addScenario } from '../scenarios';
import { createVariant } from '../variants';
import { nameOrganisation, selectRevisions } from './demo.repository';
import { type DemoProduct, type DemoVariant, range } from './range';
import { readablePassword } from './readable-password';
import { scenarioStudy } from './scenario-study';
import { administrator, colleagues, type DemoPerson, designerOf, MAKER, roleInWords } from './team';

/** A way to sign in that was made together with the demo. */
export interface SignIn {
  readonly email: string;
  readonly password: string;
  /** What this person is in the demo, in a few words. */
  readonly role: string;
}

export interface DemoDependencies {
  /** Of the engine that will compute the runs. */
  readonly engineVersion: string;
}

/** What stands in the audit in place of a request's id. */
const REQUEST = 'demo';

interface Colleague extends DemoPerson {
  readonly id: string;
  readonly signIn: SignIn;
}

async function admit(tx: Tx, passwords: Passwords, person: DemoPerson): Promise<Colleague> {
  const { name, email, organisationRole, roles } = person;
  const password = readablePassword();
  const { id } = await insertPerson(tx, {
    ...{ name, email, organisationRole },
    passwordHash: await passwords.hash(password),
    mayCreateProducts: Object.values(roles).includes('designer'),
  });
  return { ...person, id, signIn: { email, password, role: roleInWords(person) } };
}

async function addVariant(
  tx: Tx,
  product: { id: string; designer: Colleague },
  { name, study: file, further = [] }: DemoVariant,
): Promise<void> {
  const { id: productId, designer } = product;
  const actor = { personId: designer.id, requestId: REQUEST };
  const study = scenarioStudy({ study: file });
  const variantId = await createVariant({ db: tx }, actor, productId, { name, study });
  for (const scenario of further) {
    const stored = readArrivingStudy(scenarioStudy(scenario));
    await addScenario(tx, { variantId, name: scenario.name, stored, authorId: designer.id });
  }
}

async function addProduct(
  tx: Tx,
  { name, description, variants }: DemoProduct,
  team: { chief: Colleague; colleagues: readonly Colleague[] },
): Promise<void> {
  const designer = designerOf(team.colleagues, name);
  const maker = { personId: designer.id, requestId: REQUEST };
  const productId = await createProduct({ db: tx }, maker, { name, description });
  for (const { id: personId, roles } of team.colleagues) {
    const role = roles[name];
    if (role === undefined || personId === designer.id) continue;
    await setMember(
      { db: tx },
      { personId: team.chief.id, requestId: REQUEST },
      { productId, personId },
      role,
    );
  }
  for (const variant of variants) await addVariant(tx, { id: productId, designer }, variant);
}

/**
 * Fills an empty database with an invented maker: people with random passwords, products with variants and
 * scenarios, and a run of each in the queue. No answer is written here: whoever works on the queue computes them.
 *
 * @returns how its people sign in; the passwords are known to nobody else
 */
export function demoSeed({ engineVersion }: DemoDependencies): Seed<readonly SignIn[]> {
  return async (tx) => {
    const passwords = createPasswords();
    const chief = await admit(tx, passwords, administrator);
    const others: Colleague[] = [];
    for (const person of colleagues) others.push(await admit(tx, passwords, person));
    await nameOrganisation(tx, MAKER, chief.id);
    await recordInAudit(tx, {
      action: 'demo.seed',
      objectKind: 'organisation',
      objectId: MAKER,
      requestId: REQUEST,
    });
    for (const product of range) await addProduct(tx, product, { chief, colleagues: others });
    for (const revision of await selectRevisions(tx)) {
      await requestRun(tx, { ...revision, engineVersion, requestId: REQUEST });
    }
    return [chief, ...others].map(({ signIn }) => signIn);
  };
}
