const CODE = /^[A-Za-z0-9]{2,8}$/;
const SMALL_WORDS = new Set('of the de do da du des del la le los las el al and und y et'.split(' '));

/** Whether a text can be a site's code: 2 to 8 letters or digits. */
export function isCode(text: string): boolean {
  return CODE.test(text);
}

/** Codes that differ only in case are the same code. */
export function foldCode(code: string): string {
  return code.trim().toUpperCase();
}

/** Names that differ only in case and spacing are the same name. */
export function foldName(name: string): string {
  return name.normalize('NFC').trim().replace(/\s+/g, ' ').toLowerCase();
}

/**
 * Makes codes from names: the initials of a name of several words, else its first two letters; where that is taken,
 * further letters of the name; then a number. Remembers how far each number went, so that ten thousand like names
 * take no longer than ten.
 */
export class CodeMaker {
  readonly #taken: Set<string>;
  readonly #next = new Map<string, number>();

  /** @param taken the codes already in use, in any case */
  constructor(taken: Iterable<string>) {
    this.#taken = new Set([...taken].map(foldCode));
  }

  /** Keeps a code from being made. */
  take(code: string): void {
    this.#taken.add(foldCode(code));
  }

  /** Makes a code that is not taken, and takes it. */
  make(name: string): string {
    const code = candidates(name).find((candidate) => !this.#taken.has(candidate)) ?? this.#numbered(name);
    this.take(code);
    return code;
  }

  #numbered(name: string): string {
    const base = (candidates(name)[0] ?? 'S').slice(0, 3);
    for (let number = this.#next.get(base) ?? 2; ; number += 1) {
      const code = `${base}${number}`;
      if (isCode(code) && !this.#taken.has(code)) {
        this.#next.set(base, number + 1);
        return code;
      }
    }
  }
}

function candidates(name: string): string[] {
  const words = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toUpperCase()
    .split(/[^A-Z0-9]+/)
    .filter((word) => word !== '');
  const telling = words.filter((word) => !SMALL_WORDS.has(word.toLowerCase()));
  const used = telling.length > 0 ? telling : words;
  const letters = used.join('');
  const initials = used
    .map((word) => word.charAt(0))
    .join('')
    .slice(0, 4);
  const seconds = [...letters.slice(1, 8)].map((letter) => letters.charAt(0) + letter);
  return [initials, ...seconds, letters.slice(0, 3), letters.slice(0, 4)].filter(isCode);
}
