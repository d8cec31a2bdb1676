import type { Study, StudyInput } from '#contract/study.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { readContents, writeContents, type StudyContents } from '#db/queries/contents.ts';
import { insertMember } from '#db/queries/member.ts';
import { findMembership } from '#db/queries/membership.ts';
import { findStudy, insertStudy } from '#db/queries/study.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import { writeRecord } from '#server/change-study.ts';
import { notFound } from '#server/errors.ts';
import { exampleContents } from './example.ts';
import { presentStudy } from './present.ts';

type Maker = Pick<SignedIn, 'userId' | 'email'>;

/** What a study is made from, and where that came from. */
interface Origin {
  contents: StudyContents | null;
  from: Record<string, unknown>;
}

async function originOf(tx: Db, userId: string, from: string): Promise<Origin> {
  if (from === 'blank') return { contents: null, from: { origin: 'blank' } };
  if (from === 'example') return { contents: await exampleContents(tx), from: { origin: 'example' } };
  const mayRead = await findMembership(tx, { studyId: from, userId });
  const contents = mayRead && (await readContents(tx, { studyId: from }));
  const source = contents && (await findStudy(tx, { studyId: from }));
  if (!source) throw notFound('There is no study of yours with that id to copy.');
  return { contents, from: { origin: 'copy', studyId: from, revision: source.revision } };
}

function countsOf({ orbits, sites, criteria }: StudyContents) {
  return { orbits: orbits.length, sites: sites.length, criteria: criteria.length };
}

/**
 * Makes a study: blank, from the example, or as a copy of one its maker may read. The maker becomes its lead.
 * @throws AppError 'not-found' where there is nothing to copy
 */
export async function createStudy(
  db: PooledDb,
  { maker, input }: { maker: Maker; input: StudyInput },
): Promise<Study> {
  return db.transaction(async (tx) => {
    const { contents, from } = await originOf(tx, maker.userId, input.from);
    const { id: studyId } = await insertStudy(tx, { title: input.title, createdBy: maker.userId });
    await insertMember(tx, {
      studyId,
      email: maker.email.toLowerCase(),
      userId: maker.userId,
      role: 'lead',
      addedBy: maker.userId,
    });
    if (contents) await writeContents(tx, { studyId, contents });
    const to = { title: input.title, ...from, ...(contents ? countsOf(contents) : {}) };
    await writeRecord(tx, { studyId, userId: maker.userId, revision: 1 }, [
      { object: 'study', objectId: studyId, action: 'add', to },
    ]);
    const row = await findStudy(tx, { studyId });
    if (!row) throw new Error(`study ${studyId} was made and not found`);
    return presentStudy(row, 'lead');
  });
}
