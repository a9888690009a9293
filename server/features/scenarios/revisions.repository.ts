import { and, desc, eq } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { people, scenarioRevisions, variantRevisions } from '../../db/schema';

const listed = {
  id: scenarioRevisions.id,
  number: scenarioRevisions.number,
  variantRevision: variantRevisions.number,
  studyHash: scenarioRevisions.studyHash,
  note: scenarioRevisions.note,
  author: people.name,
  at: scenarioRevisions.createdAt,
};

const complete = { ...listed, study: scenarioRevisions.study };

function selectRevisions(db: Executor) {
  return db
    .select(complete)
    .from(scenarioRevisions)
    .innerJoin(variantRevisions, eq(variantRevisions.id, scenarioRevisions.variantRevisionId))
    .innerJoin(people, eq(people.id, scenarioRevisions.authorId))
    .$dynamic();
}

export type RevisionRow = Awaited<ReturnType<typeof selectRevisions>>[number];

/** Newest first, without the studies. */
export function listRevisions(db: Executor, scenarioId: string) {
  return db
    .select(listed)
    .from(scenarioRevisions)
    .innerJoin(variantRevisions, eq(variantRevisions.id, scenarioRevisions.variantRevisionId))
    .innerJoin(people, eq(people.id, scenarioRevisions.authorId))
    .where(eq(scenarioRevisions.scenarioId, scenarioId))
    .orderBy(desc(scenarioRevisions.number));
}

export async function findRevision(
  db: Executor,
  scenarioId: string,
  number: number,
): Promise<RevisionRow | undefined> {
  const [row] = await selectRevisions(db).where(
    and(eq(scenarioRevisions.scenarioId, scenarioId), eq(scenarioRevisions.number, number)),
  );
  return row;
}

/** The newest revision; every scenario has one. */
export async function findHead(db: Executor, scenarioId: string): Promise<RevisionRow> {
  const [row] = await selectRevisions(db)
    .where(eq(scenarioRevisions.scenarioId, scenarioId))
    .orderBy(desc(scenarioRevisions.number))
    .limit(1);
  return row;
}

export type NewRevision = typeof scenarioRevisions.$inferInsert;

export async function insertRevision(tx: Tx, revision: NewRevision): Promise<void> {
  await tx.insert(scenarioRevisions).values(revision);
}
