import { Path, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { MemoBlock, MemoCaution, MemoCode, MemoFormulas, MemoText } from '#contract/memo.ts';
import { cautionBand } from './bars.ts';
import { Contributions } from './contributions.tsx';
import { MapFigure } from './map.tsx';
import { Table } from './table.tsx';
import { INK, MONO, RULE, TYPE } from './theme.ts';

const BAND = 10;
/** The band is drawn taller than any caution and cut to its height. */
const BAND_HEIGHT = 160;

const s = StyleSheet.create({
  paragraph: { ...TYPE.body, marginBottom: 6 },
  caution: {
    flexDirection: 'row',
    borderWidth: RULE.light,
    borderColor: INK.ink,
    marginTop: 8,
    marginBottom: 8,
    paddingLeft: BAND,
    overflow: 'hidden',
  },
  band: { position: 'absolute', left: 0, top: 0, bottom: 0, width: BAND, overflow: 'hidden' },
  cautionText: { ...TYPE.note, color: INK.ink2, paddingHorizontal: 10, paddingVertical: 6 },
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

function Caution({ caution }: { caution: MemoCaution }) {
  return (
    <View style={s.caution} wrap={false}>
      <View style={s.band}>
        <Svg viewBox={`0 0 ${BAND} ${BAND_HEIGHT}`} style={{ width: BAND, height: BAND_HEIGHT }}>
          <Path {...cautionBand(BAND, BAND_HEIGHT)} fill="none" />
        </Svg>
      </View>
      <Text style={s.cautionText}>
        <Text style={{ fontWeight: 600, color: INK.ink }}>{caution.strong}</Text>
        {` ${caution.text}`}
      </Text>
    </View>
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

/** One block of the memo. @param width of the text, points. */
export function Block({ block, width }: { block: MemoBlock; width: number }) {
  switch (block.kind) {
    case 'paragraph':
      return (
        <Text style={s.paragraph}>
          <Runs text={block.text} />
        </Text>
      );
    case 'caution':
      return <Caution caution={block} />;
    case 'formulas':
      return <Formulas formulas={block} />;
    case 'code':
      return <Code code={block} />;
    case 'table':
      return <Table table={block} />;
    case 'contributions':
      return <Contributions figure={block} />;
    case 'map':
      return <MapFigure map={block} width={width} />;
  }
}
