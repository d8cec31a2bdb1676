import { formatCount, initialsOf } from '#contract/format.ts';
import { type SectionFrame, type SectionKey, type StudyFrame, type ViewerFrame } from '#contract/frame.ts';
import { findFrame } from '#db/queries/frame.ts';
import { notFound } from '#server/errors.ts';
import { requireMember, requireUser } from '#server/member.ts';
import { rankingFact, type Fact } from './ranking-fact.ts';

type Row = NonNullable<Awaited<ReturnType<typeof findFrame>>>;

/** "Rowan M" of "Rowan M (invented medium two-stage, boosters optional)": what stands in brackets is a remark. */
const shortName = (name: string): string => name.replace(/\s*\(.*\)\s*$/, '') || 'vehicle chosen';

function requirementFact({ orbits, vehicleName }: Row): Fact {
  const vehicle = vehicleName === null ? 'no vehicle' : shortName(vehicleName);
  return {
    fact:
      orbits === 0 && vehicleName === null ? 'to be written' : `${formatCount(orbits, 'orbit')}, ${vehicle}`,
    outstanding: orbits === 0 || vehicleName === null,
  };
}

function criteriaFact({ criteria, weighted }: Row): Fact {
  if (criteria === 0) return { fact: 'none yet', outstanding: true };
  return { fact: `${criteria}, weights ${weighted ? 'set' : 'not set'}`, outstanding: !weighted };
}

const factsOf = (row: Row, ranking: Fact): Record<SectionKey, Fact> => ({
  requirement: requirementFact(row),
  sites: {
    fact: row.sites === 0 ? 'none yet' : formatCount(row.sites, 'candidate'),
    outstanding: row.sites === 0,
  },
  flight: {
    fact: row.sites * row.orbits === 0 ? 'no results yet' : formatCount(row.sites * row.orbits, 'result'),
    outstanding: row.sites * row.orbits === 0,
  },
  downrange: {
    fact: row.sites === 0 ? 'no sites yet' : 'corridors: screening',
    outstanding: row.sites === 0,
  },
  criteria: criteriaFact(row),
  ranking,
  memo: { fact: 'draft', outstanding: false },
});

const NAMES: Record<SectionKey, string> = {
  requirement: 'Requirement',
  sites: 'Sites',
  flight: 'Flight',
  downrange: 'Downrange',
  criteria: 'Criteria',
  ranking: 'Ranking',
  memo: 'Memo',
};

function sectionsOf(studyId: string, facts: Record<SectionKey, Fact>): SectionFrame[] {
  return (Object.keys(NAMES) as SectionKey[]).map((key) => ({
    key,
    name: NAMES[key],
    href: `/studies/${studyId}/${key}`,
    ...facts[key],
  }));
}

/** The person who looks, for the frame of pages outside a study. */
export function viewerOf(locals: App.Locals): ViewerFrame {
  const { name, administrator } = requireUser(locals);
  return { name, initials: initialsOf(name), administrator };
}

/** What a study's page shows round its sheet: title block and sections, each with its line of fact. */
export async function loadFrame(locals: App.Locals): Promise<StudyFrame> {
  const { studyId, userId, role } = requireMember(locals);
  const row = await findFrame(locals.db, { studyId });
  if (!row) throw notFound();
  const ranking = await rankingFact(locals.db, { ...row, studyId, userId });
  return {
    study: {
      id: row.id,
      title: row.title,
      organisation: row.organisation,
      state: row.state,
      revision: row.revision,
      savedAt: row.savedAt.toISOString(),
      role,
      archived: row.archivedAt !== null,
    },
    viewer: viewerOf(locals),
    sections: sectionsOf(studyId, factsOf(row, ranking)),
  };
}
