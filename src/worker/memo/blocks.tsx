import { StyleSheet, Text, View } from '@react-pdf/renderer';
import type { MemoBlock, MemoCode, MemoFormulas, MemoText } from '#contract/memo.ts';
import { Caution } from './caution.tsx';
import { Contributions } from './contributions.tsx';
import { MapFigure } from './map.tsx';
import { Table } from './table.tsx';
import { INK, MONO, TYPE } from './theme.ts';

const s = StyleSheet.create({
  paragraph: { ...TYPE.body, marginBottom: 6 },
  formula: { flexDirection: 'row', gap: 10, marginBottom: 4 },
  formulaText: { ...TYPE.table, width: '46%' },
  meaning: { ...TYPE.table, color: INK.ink2, width: '54%' },
  codeLabel: { ...TYPE.note, color: INK.ink3 },
  code: { ...TYPE.dense, fontFamily: MONO, marginBottom: 6 },
});

export function Runs({ text }: { text: MemoText }) {
  return (
    <>
      {text.map((run, at) =>
        typeof run === 'string' ? (
          run
        ) : (
          <Text key={at} style={{ fontWeight: 600 }}>
            {run.strong}
          </Text>
        ),
      )}
    </>
  );
}

function Formulas({ formulas }: { formulas: MemoFormulas }) {
  return (
    <View style={{ marginBottom: 6 }}>
      {formulas.items.map((item, at) => (
        <View key={at} style={s.formula} wrap={false}>
          <Text style={s.formulaText}>{item.formula}</Text>
          <Text style={s.meaning}>{item.meaning}</Text>
        </View>
      ))}
    </View>
  );
}

function Code({ code }: { code: MemoCode }) {
  return (
    <View wrap={false}>
      <Text style={s.codeLabel}>{code.label}</Text>
      <Text style={s.code}>{code.text}</Text>
    </View>
  );
}

const isHeading = ([first, ...rest]: MemoText): boolean => typeof first === 'object' && rest.length === 0;

/** One block of the memo. @param width of the text, points. */
export function Block({ block, width }: { block: MemoBlock; width: number }) {
  switch (block.kind) {
    case 'paragraph':
      return (
        // A heading of a few words must not stand at the foot of a page.
        <View {...(isHeading(block.text) ? { minPresenceAhead: 60 } : {})}>
          <Text style={s.paragraph}>
            <Runs text={block.text} />
          </Text>
        </View>
      );
    case 'caution':
      return <Caution caution={block} />;
    case 'formulas':
      return <Formulas formulas={block} />;
    case 'code':
      return <Code code={block} />;
    case 'table':
      return <Table table={block} width={width} />;
    case 'contributions':
      return <Contributions figure={block} />;
    case 'map':
      return <MapFigure map={block} width={width} />;
  }
}
