import { Path, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { MemoContributions } from '#contract/memo.ts';
import { barPart, type Stroke } from './bars.ts';
import { INK, MONO, RULE, TYPE } from './theme.ts';

const NAME = 130;
const BAR = 296;
const HEIGHT = 8.5;
const ROW = 12;
/** Up to so many bars stay on one page. */
const WHOLE = 24;
const TICKS = [0, 0.25, 0.5, 0.75, 1];

const s = StyleSheet.create({
  figure: { marginBottom: 2 },
  caption: { ...TYPE.caption, marginTop: 5, marginBottom: 2 },
  row: { flexDirection: 'row', alignItems: 'center', minHeight: ROW },
  name: { ...TYPE.table, width: NAME, paddingRight: 6 },
  value: { ...TYPE.table, fontFamily: MONO, paddingLeft: 6, width: 60 },
  letters: { height: 11, marginLeft: NAME, width: BAR },
  letter: {
    ...TYPE.dense,
    fontFamily: MONO,
    position: 'absolute',
    width: 20,
    textAlign: 'center',
    color: INK.ink2,
  },
  ticks: { height: 12, marginLeft: NAME, width: BAR },
  note: { ...TYPE.note, color: INK.ink2, marginTop: 3 },
});

function Strokes({ strokes }: { strokes: Stroke[] }) {
  return (
    <>
      {strokes.map((stroke, at) => (
        <Path key={at} {...stroke} fill={stroke.fill ?? 'none'} />
      ))}
    </>
  );
}

type Bar = MemoContributions['bars'][number];

function BarRow({ bar, leader }: { bar: Bar; leader: number }) {
  return (
    <View wrap={false} style={s.row}>
      <Text style={[s.name, bar.leads ? { color: INK.signal, fontWeight: 600 } : {}]}>{bar.name}</Text>
      <Svg viewBox={`0 0 ${BAR} ${ROW}`} style={{ width: BAR, height: ROW }}>
        <Path
          d={TICKS.map((t) => `M${t * BAR} 0V${ROW}`).join('')}
          stroke={INK.rule}
          strokeWidth={RULE.hair}
          fill="none"
        />
        {bar.parts.map((part, at) => (
          <Strokes
            key={at}
            strokes={barPart(
              part.pattern,
              part.start * BAR + 0.5,
              (ROW - HEIGHT) / 2,
              part.length * BAR - 1,
              HEIGHT,
            )}
          />
        ))}
        <Path d={`M${leader * BAR} 0V${ROW}`} stroke={INK.signal} strokeWidth={1} fill="none" />
      </Svg>
      <Text style={[s.value, bar.leads ? { color: INK.signal, fontWeight: 600 } : {}]}>{bar.value}</Text>
    </View>
  );
}

function Letters({ bar }: { bar: Bar }) {
  return (
    <View style={s.letters}>
      {bar.parts
        .filter((part) => part.length * BAR >= 6)
        .map((part) => (
          <Text key={part.letter} style={[s.letter, { left: (part.start + part.length / 2) * BAR - 10 }]}>
            {part.letter}
          </Text>
        ))}
    </View>
  );
}

function Ticks() {
  return (
    <View style={s.ticks}>
      {TICKS.map((tick) => (
        <Text key={tick} style={[s.letter, { left: tick * BAR - 10 }]}>
          {String(tick)}
        </Text>
      ))}
    </View>
  );
}

function Key({ figure }: { figure: MemoContributions }) {
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: 10, rowGap: 2, marginTop: 2 }}>
      {figure.key.map((entry) => (
        <View
          key={entry.letter + entry.name}
          style={{ flexDirection: 'row', alignItems: 'center', maxWidth: '100%' }}
        >
          <Svg viewBox="0 0 14 8" style={{ width: 14, height: 8, flexShrink: 0 }}>
            <Strokes strokes={barPart(entry.pattern, 0.3, 0.3, 13.4, 7.4)} />
          </Svg>
          <Text style={[s.note, { marginTop: 0, marginLeft: 3, flexShrink: 1 }]}>
            <Text style={{ fontWeight: 600, color: INK.ink }}>{entry.letter}</Text>
            {`${entry.letter === '' ? '' : ' '}${entry.name} ${entry.weight}`}
          </Text>
        </View>
      ))}
    </View>
  );
}

/** What the overall values are made of: a bar a site, a pattern and a letter a criterion. */
export function Contributions({ figure }: { figure: MemoContributions }) {
  const first = figure.bars[0];
  const leader = figure.bars.find((bar) => bar.leads)?.total ?? first?.total ?? 0;
  return (
    <View style={s.figure} wrap={figure.bars.length > WHOLE}>
      <Text style={s.caption}>{`Figure ${figure.number}. ${figure.caption}`}</Text>
      {first && <Letters bar={first} />}
      {figure.bars.map((bar, at) => (
        <BarRow key={at} bar={bar} leader={leader} />
      ))}
      <Ticks />
      <Key figure={figure} />
    </View>
  );
}
