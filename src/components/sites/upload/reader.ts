import { apiFetch } from '#components/live/api.ts';
import type { CriterionList } from '#contract/criterion.ts';
import { MAX_PAGE_SIZE } from '#contract/list.ts';
import type { ExistingCriterion } from '#core/csv/criterion-columns.ts';
import type { ExistingSite } from '#core/csv/outcomes.ts';
import type { ReadOptions, SitesFile, UnreadableFile } from '#core/csv/read-sites.ts';
import type { ReadAnswer, ReadRequest } from './read-sites.worker.ts';

/** What a file is read beside: the study as it is now. */
export interface StudyContents {
  existing: ExistingSite[];
  criteria: ExistingCriterion[];
}

interface SiteFeature {
  id: string;
  geometry: { coordinates: [longitudeDeg: number, latitudeDeg: number, elevationM: number] };
  properties: { code: string; name: string };
}

const KINDS = { entered: 'number', rating: 'rating', text: 'text', computed: 'computed' } as const;

/** The study's sites, all in one answer, and its criteria. */
export async function readContents(studyId: string): Promise<StudyContents> {
  const address = `/api/v1/studies/${studyId}`;
  const [sites, criteria] = await Promise.all([
    apiFetch<{ features: SiteFeature[] }>(`${address}/sites.geojson`),
    apiFetch<CriterionList>(`${address}/criteria?pageSize=${MAX_PAGE_SIZE}`),
  ]);
  return {
    existing: sites.features.map(({ id, geometry, properties: { code, name } }) => {
      const [longitudeDeg, latitudeDeg] = geometry.coordinates;
      return { id, code, name, latitudeDeg, longitudeDeg };
    }),
    criteria: criteria.items.map(({ id, name, unit, source, steps }) => ({
      id,
      name,
      unit,
      kind: KINDS[source],
      steps,
    })),
  };
}

let worker: Worker | undefined;
let lastId = 0;

function reader(): Worker {
  worker ??= new Worker(new URL('./read-sites.worker.ts', import.meta.url), { type: 'module' });
  return worker;
}

/** Reads a file off the page's own thread, so that the page goes on answering. */
export function readInWorker(bytes: Uint8Array, options: ReadOptions): Promise<SitesFile | UnreadableFile> {
  lastId += 1;
  const request: ReadRequest = { id: lastId, bytes, options };
  const target = reader();
  return new Promise((resolve, reject) => {
    const hear = ({ data }: MessageEvent<ReadAnswer>) => {
      if (data.id !== request.id) return;
      leave();
      resolve(data.file);
    };
    const fail = (event: ErrorEvent) => {
      leave();
      worker = undefined;
      reject(new Error(`the reader stopped: ${event.message}`));
    };
    const leave = () => {
      target.removeEventListener('message', hear);
      target.removeEventListener('error', fail);
    };
    target.addEventListener('message', hear);
    target.addEventListener('error', fail);
    target.postMessage(request);
  });
}
