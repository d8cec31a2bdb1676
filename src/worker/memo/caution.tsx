import { Path, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { MemoCaution } from '#contract/memo.ts';
import { cautionBand } from './bars.ts';
import { INK, RULE, TYPE } from './theme.ts';

const BAND = 10;
/** The band is drawn taller than any caution and cut to its height. */
const BAND_HEIGHT = 160;

const s = StyleSheet.create({
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
});

/** A caution: hatched band, ink edge, no colour. */
export function Caution({ caution }: { caution: MemoCaution }) {
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
