import { describe, expect, test } from 'vitest';
import { DecideInput } from '#contract/decide.ts';
import { decide, decisionBytes } from '#contract/decision.ts';
import { respondWithDecision } from '#server/decide/respond.ts';

const request = (samples: number) =>
  DecideInput.parse({
    criteria: [
      { code: 'A', worst: 0, best: 1 },
      { code: 'B', worst: 0, best: 1 },
    ],
    weights: { A: 0.5, B: 0.5 },
    alternatives: [
      { code: 'X', figures: { A: 1, B: { low: 0, likely: 0.1, high: 0.4 } } },
      { code: 'Y', figures: { A: 0.2, B: 1 } },
    ],
    acceptability: { samples, seed: 3, weights: { band: 0.5 } },
  });

describe('a decision', () => {
  test.each([
    [10, 0],
    [200_000, 1],
  ])('of %s samples: %s threads, and the same answer', async (samples, threads) => {
    let started = 0;
    const answer = await respondWithDecision(request(samples), async (input) => {
      started += 1;
      return decisionBytes(input);
    });
    expect(started).toBe(threads);
    expect(answer.headers.get('content-type')).toBe('application/json');
    expect(await answer.json()).toEqual(decide(request(samples)));
  });

  test('a thread that fails fails the request', async () => {
    const failing = respondWithDecision(request(200_000), () =>
      Promise.reject(new Error('the thread ended')),
    );
    await expect(failing).rejects.toThrow('the thread ended');
  });
});
