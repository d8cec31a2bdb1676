import { G, Path, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { MemoMap, MemoPad } from '#contract/memo.ts';
import { INK, MONO, RULE, SANS, TYPE } from './theme.ts';

const s = StyleSheet.create({
  figure: { marginTop: 10, marginBottom: 10 },
  caption: { ...TYPE.caption, marginBottom: 4 },
  note: { ...TYPE.note, color: INK.ink2, marginTop: 3 },
});

/** A survey triangle with a dot; the leader's is filled. */
function Pad({ pad }: { pad: MemoPad }) {
  const colour = pad.mark === 'leads' ? INK.signal : pad.mark === 'ranked' ? INK.ink : INK.ink3;
  const triangle = `M${pad.x} ${pad.y - 3.6}l3.2 5.6h-6.4Z`;
  return (
    <G>
      <Path d={triangle} fill={pad.mark === 'leads' ? colour : INK.paper} stroke={colour} strokeWidth={0.9} />
      <Path d={`M${pad.x - 0.5} ${pad.y}h1v1h-1Z`} fill={pad.mark === 'leads' ? INK.paper : colour} />
    </G>
  );
}

function Label({ pad }: { pad: MemoPad }) {
  if (!pad.label) return null;
  const leads = pad.mark === 'leads';
  return (
    <Text
      x={pad.label.x}
      y={pad.label.y}
      fill={leads ? INK.signal : INK.ink}
      style={{ fontFamily: MONO, fontSize: 7, fontWeight: leads ? 600 : 400 }}
    >
      {pad.label.text}
    </Text>
  );
}

/** The candidates on the coast, drawn as vectors. */
export function MapFigure({ map, width }: { map: MemoMap; width: number }) {
  const left = Math.min(...map.degrees.filter((d) => d.side === 'left').map((d) => d.x), map.width) + 3;
  const bottom = map.height - 11;
  const frame = `M${left} 0H${map.width}V${bottom}H${left}Z`;
  return (
    <View style={s.figure} wrap={false}>
      <Text style={s.caption}>{`Figure ${map.number}. ${map.caption}`}</Text>
      <Svg
        viewBox={`0 0 ${map.width} ${map.height}`}
        style={{ width, height: (map.height * width) / map.width }}
      >
        <Path d={frame} fill={INK.sea} />
        <Path d={map.graticule} fill="none" stroke={INK.graticule} strokeWidth={RULE.hair} />
        <Path d={map.land} fill={INK.land} stroke={INK.coast} strokeWidth={0.45} />
        <Path d={frame} fill="none" stroke={INK.ink} strokeWidth={RULE.heavy} />
        {map.degrees.map((degree) => (
          <Text
            key={degree.side + degree.text}
            x={degree.x}
            y={degree.y}
            fill={INK.ink2}
            textAnchor={degree.side === 'left' ? 'end' : 'middle'}
            style={{ fontFamily: SANS, fontSize: 6.5 }}
          >
            {degree.text}
          </Text>
        ))}
        {map.others !== '' && <Path d={map.others} fill={INK.ink3} />}
        {map.pads.map((pad, at) =>
          pad.leader ? (
            <Path
              key={at}
              d={`M${pad.leader.x1} ${pad.leader.y1}L${pad.leader.x2} ${pad.leader.y2}`}
              fill="none"
              stroke={INK.ink2}
              strokeWidth={0.5}
            />
          ) : null,
        )}
        {[...map.pads].reverse().map((pad, at) => (
          <Pad key={at} pad={pad} />
        ))}
        {map.pads.map((pad, at) => (
          <Label key={at} pad={pad} />
        ))}
      </Svg>
      {map.notes.map((note, at) => (
        <Text key={at} style={s.note}>
          {note}
        </Text>
      ))}
    </View>
  );
}
