import { renderToBuffer } from '@react-pdf/renderer';
import type { MemoModel } from '#contract/memo.ts';
import { MemoDocument } from './document.tsx';
import { plexCoverage } from './fonts.ts';
import { printable, REPLACEMENT } from './printable.ts';

/** Says what the replacement character stands for, where there is one. */
function explained(model: MemoModel): MemoModel {
  const last = model.sections.at(-1);
  if (!last || !JSON.stringify(model).includes(REPLACEMENT)) return model;
  const text = `${REPLACEMENT} stands for a character that IBM Plex, the memo's typeface, does not have. The study's CSV has it.`;
  const blocks = [...last.blocks, { kind: 'paragraph' as const, text: [text] }];
  return { ...model, sections: [...model.sections.slice(0, -1), { ...last, blocks }] };
}

/**
 * The memo as a PDF. The same model gives the same bytes.
 * @param model everything that is printed.
 * @returns the file.
 */
export async function renderMemo(model: MemoModel): Promise<Uint8Array> {
  const covers = await plexCoverage();
  const document = <MemoDocument model={explained(printable(model, covers))} />;
  return new Uint8Array(await renderToBuffer(document));
}
