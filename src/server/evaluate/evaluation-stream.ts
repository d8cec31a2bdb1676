import type { EvaluateInput } from '#contract/evaluate.ts';
import { runInThread } from '#server/threads.ts';

/** Results worked out at a time: a few milliseconds to some tenths of a second of one thread. */
const PART_RESULTS = 1_000;
/** Parts under way at once: enough to keep the threads busy while one is being sent. */
const AHEAD = 3;

/** Works out a part and answers with its sites as JSON text, without the brackets of the list. */
export type RunPart = (part: EvaluateInput) => Promise<Uint8Array>;

const runPart: RunPart = (part) => runInThread('evaluate-thread', part);

/** The request split by sites, each part about PART_RESULTS results. */
export function partsOf(input: EvaluateInput): EvaluateInput[] {
  const sitesPerPart = Math.max(1, Math.floor(PART_RESULTS / input.orbits.length));
  const parts: EvaluateInput[] = [];
  for (let at = 0; at < input.sites.length; at += sitesPerPart) {
    parts.push({ ...input, sites: input.sites.slice(at, at + sitesPerPart) });
  }
  return parts;
}

/** The parts in order, worked out a few ahead and no faster than they are taken. */
async function* inOrder(parts: readonly EvaluateInput[], run: RunPart): AsyncGenerator<Uint8Array> {
  const underWay: Promise<Uint8Array>[] = [];
  for (let at = 0; at < parts.length; at++) {
    while (underWay.length < AHEAD && at + underWay.length < parts.length) {
      const started = run(parts[at + underWay.length] as EvaluateInput);
      // A later part may fail before its turn; the failure is reported when its turn comes.
      started.catch(() => undefined);
      underWay.push(started);
    }
    yield await (underWay.shift() as Promise<Uint8Array>);
  }
}

/**
 * The evaluation as one JSON text in pieces: `head` opens it (up to and with `"sites":[`), the parts follow, then the
 * closing brackets. What the reader leaves, nobody works out.
 */
export async function* evaluationPieces(
  input: EvaluateInput,
  head = '{"sites":[',
  run: RunPart = runPart,
): AsyncGenerator<Uint8Array> {
  const encoder = new TextEncoder();
  let separator = head;
  for await (const part of inOrder(partsOf(input), run)) {
    yield encoder.encode(separator);
    yield part;
    separator = ',';
  }
  yield encoder.encode(separator === ',' ? ']}' : `${head}]}`);
}
