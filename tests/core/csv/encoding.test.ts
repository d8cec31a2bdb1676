import { describe, expect, test } from 'vitest';
import { decode } from '#core/csv/encoding.ts';

const TEXT = 'name,lat,lon\r\nÎle Ärö,−4.5,12°\r\n';
const utf8 = (text: string) => new TextEncoder().encode(text);

/** UTF-16 by its definition (Unicode Standard, section 3.10): each code unit as two bytes. */
function utf16(text: string, little: boolean, mark: boolean): Uint8Array {
  const units = [...((mark ? '\ufeff' : '') + text)].flatMap((c) => [...c].map((u) => u.charCodeAt(0)));
  return Uint8Array.from(units.flatMap((u) => (little ? [u & 255, u >> 8] : [u >> 8, u & 255])));
}

describe('decode', () => {
  test.each([
    ['UTF-8', utf8(TEXT), 'utf-8'],
    ['UTF-8 with its mark', utf8(`\ufeff${TEXT}`), 'utf-8'],
    ['UTF-16 LE with its mark', utf16(TEXT, true, true), 'utf-16le'],
    ['UTF-16 LE without', utf16(TEXT, true, false), 'utf-16le'],
    ['UTF-16 BE with its mark', utf16(TEXT, false, true), 'utf-16be'],
    ['UTF-16 BE without', utf16(TEXT, false, false), 'utf-16be'],
  ])('%s', (_, bytes, encoding) => {
    expect(decode(bytes)).toEqual({ kind: 'text', text: TEXT, encoding });
  });

  test('UTF-16 without a mark whose names are all Cyrillic', () => {
    const text = 'name;lat;lon\nМыс Северный;70,1;31,2\nБухта Тихая;69,5;33,9\n';
    expect(decode(utf16(text, true, false))).toEqual({ kind: 'text', text, encoding: 'utf-16le' });
  });

  // WHATWG Encoding Standard, index-windows-1252: 0x80 €, 0x92 ’, 0x96 –, 0x9F Ÿ, 0xB0 °, 0xE9 é [from memory]
  test('Windows-1252, where the bytes are not UTF-8', () => {
    const bytes = Uint8Array.from([...utf8('name,lat,lon\n'), 0x80, 0x92, 0x96, 0x9f, 0xb0, 0xe9, 0x0a]);
    expect(decode(bytes)).toEqual({
      kind: 'text',
      text: 'name,lat,lon\n€’–Ÿ°é\n',
      encoding: 'windows-1252',
    });
  });

  test('an encoding that is named is used', () => {
    expect(decode(utf8('Île'), 'windows-1252')).toMatchObject({ kind: 'text', text: 'ÃŽle' });
    expect(decode(Uint8Array.from([0xe9, 0x2c]), 'utf-8')).toMatchObject({
      kind: 'refused',
      code: 'encoding',
    });
  });

  test.each([
    ['zero bytes', Uint8Array.from([1, 0, 0, 0, 7, 0, 0, 0])],
    ['a PNG', Uint8Array.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13])],
    ['a PDF', utf8('%PDF-1.7\n1 0 obj\n')],
    ['a zipped workbook', Uint8Array.from([0x50, 0x4b, 3, 4, 20, 0, 6, 0])],
    ['a compound workbook', Uint8Array.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1])],
    ['random control characters', Uint8Array.from({ length: 400 }, (_, i) => (i * 7) % 32)],
  ])('refuses %s', (_, bytes) => {
    expect(decode(bytes)).toMatchObject({ kind: 'refused', code: 'binary' });
  });
});
