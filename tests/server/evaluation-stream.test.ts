import { describe, expect, test } from 'vitest';
import { EvaluateInput } from '#contract/evaluate.ts';
import { evaluate, evaluationPart } from '#contract/flights.ts';
import { evaluationPieces, partsOf } from '#server/evaluate/evaluation-stream.ts';

const request = (sites: number) =>
  EvaluateInput.parse({
    sites: Array.from({ length: sites }, (_, k) => ({
      code: `S${k}`,
      latitudeDeg: (k % 120) - 60,
      longitudeDeg: 0,
      permittedAzimuthsDeg: k % 2 ? [[k % 300, (k % 300) + 40]] : [],
    })),
    orbits: [
      { code: 'A', perigeeKm: 500, apogeeKm: 500, inclinationDeg: 51.6 },
      { code: 'B', perigeeKm: 600, apogeeKm: 600, sunSynchronous: true },
    ],
  });

async function textOf(pieces: AsyncGenerator<Uint8Array>): Promise<string> {
  const chunks: Uint8Array[] = [];
  for await (const piece of pieces) chunks.push(piece);
  return Buffer.concat(chunks).toString('utf8');
}

describe('an evaluation in pieces', () => {
  test('joins up to the same JSON as the whole', async () => {
    const input = request(1201);
    expect(partsOf(input).length).toBeGreaterThan(2);
    const text = await textOf(
      evaluationPieces(input, '{"revision":7,"sites":[', async (part) => evaluationPart(part)),
    );
    expect(JSON.parse(text)).toEqual({ revision: 7, sites: JSON.parse(JSON.stringify(evaluate(input))) });
  });

  test('runs a few parts ahead, no more, and none after the reader has left', async () => {
    let started = 0;
    const pieces = evaluationPieces(request(10_000), undefined, async (part) => {
      started += 1;
      return evaluationPart(part);
    });
    await pieces.next();
    expect(started).toBe(3);
    await pieces.return(undefined);
    expect(started).toBe(3);
  });

  test('a part that fails fails the evaluation', async () => {
    const failing = evaluationPieces(request(2000), undefined, async () => {
      throw new Error('the thread ended');
    });
    await expect(failing.next()).rejects.toThrow('the thread ended');
  });
});
