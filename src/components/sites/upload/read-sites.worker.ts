import { readSites, type ReadOptions, type SitesFile, type UnreadableFile } from '#core/csv/read-sites.ts';

/** One file to read; `id` tells answers apart when a second is asked for before the first is done. */
export interface ReadRequest {
  id: number;
  bytes: Uint8Array;
  options: ReadOptions;
}
export interface ReadAnswer {
  id: number;
  file: SitesFile | UnreadableFile;
}

self.addEventListener('message', ({ data }: MessageEvent<ReadRequest>) => {
  const answer: ReadAnswer = { id: data.id, file: readSites(data.bytes, data.options) };
  self.postMessage(answer);
});
