const MASK = (1n << 64n) - 1n;

/**
 * The first outputs of SplitMix64, which spreads a seed over a larger state.
 * @param seed whole, 0 to 2^53 − 1.
 * @see references.ts `blackmanVigna`; checked by tests/reference/random-streams.csv
 */
export function splitMix64(seed: number, count: number): bigint[] {
  let state = BigInt(seed);
  return Array.from({ length: count }, () => {
    state = (state + 0x9e3779b97f4a7c15n) & MASK;
    let z = state;
    z = ((z ^ (z >> 30n)) * 0xbf58476d1ce4e5b9n) & MASK;
    z = ((z ^ (z >> 27n)) * 0x94d049bb133111ebn) & MASK;
    return z ^ (z >> 31n);
  });
}

/** A stream of pseudo-random numbers that one seed fixes on every machine. */
export interface RandomStream {
  /** Fills a buffer with uniform figures in (0, 1), neither end among them, in steps of 2^−32. */
  fill(buffer: Float64Array): void;
}

/**
 * The generator xoshiro128** 1.1: 32-bit whole numbers, period 2^128 − 1.
 * @param state four 32-bit words, not all 0.
 * @see references.ts `blackmanVigna`; checked by tests/reference/random-streams.csv
 */
export function xoshiro128(state: Uint32Array): RandomStream {
  let [s0 = 0, s1 = 0, s2 = 0, s3 = 0] = state;
  return {
    // Kept in local variables over a whole buffer: one call a figure would cost more than the figure.
    fill(buffer) {
      let [a, b, c, d] = [s0, s1, s2, s3];
      for (let k = 0; k < buffer.length; k++) {
        const five = Math.imul(b, 5);
        const word = Math.imul((five << 7) | (five >>> 25), 9) >>> 0;
        buffer[k] = (word + 0.5) / 4_294_967_296;
        const shifted = b << 9;
        c ^= a;
        d ^= b;
        b ^= c;
        a ^= d;
        c ^= shifted;
        d = (d << 11) | (d >>> 21);
      }
      [s0, s1, s2, s3] = [a, b, c, d];
    },
  };
}

/**
 * A stream from one whole number: xoshiro128** whose state SplitMix64 fills, low word first.
 * @param seed 0 to 2^53 − 1.
 * @throws RangeError when the seed is no such number.
 */
export function streamFrom(seed: number): RandomStream {
  if (!Number.isSafeInteger(seed) || seed < 0)
    throw new RangeError(`streamFrom: ${seed} is no seed from 0 to 2^53 − 1`);
  const words = splitMix64(seed, 2).flatMap((word) => [Number(word & 0xffffffffn), Number(word >> 32n)]);
  return xoshiro128(Uint32Array.from(words));
}
