import { Path, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { MemoCaution, MemoTitleBlock } from '#contract/memo.ts';
import { Caution } from './caution.tsx';
import { INK, MARGIN, MM, RULE, SANS, TYPE } from './theme.ts';

/** The foot line stands in the foot margin, under the title block of the first page. */
const FOOT_LINE = 5 * MM;
const FOOT_HEIGHT = 12;
const TITLE_BLOCK = 13 * MM;
/** Title block and the caution over it. */
export const FIRST_FOOT = TITLE_BLOCK + 30;

const s = StyleSheet.create({
  head: {
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'flex-end',
    borderBottomWidth: RULE.heavy,
    borderColor: INK.ink,
    paddingBottom: 4,
    marginBottom: 12,
  },
  brand: { flexDirection: 'row', alignItems: 'center', gap: 5 },
  name: { fontSize: 11, fontWeight: 600, letterSpacing: -0.13 },
  status: { ...TYPE.table, fontWeight: 600 },
  foot: {
    position: 'absolute',
    left: MARGIN.left,
    right: MARGIN.right,
    height: FOOT_HEIGHT,
    flexDirection: 'row',
    justifyContent: 'space-between',
    gap: 12,
  },
  footText: { ...TYPE.dense, color: INK.ink3, flex: 1, maxLines: 1, textOverflow: 'ellipsis' },
  // Without a leading: a text that is made anew on each page loses its height with one.
  page: { fontSize: TYPE.dense.fontSize, color: INK.ink3, width: 70, textAlign: 'right' },
  block: {
    position: 'absolute',
    left: MARGIN.left,
    right: MARGIN.right,
    height: FIRST_FOOT,
    justifyContent: 'flex-end',
  },
  cells: {
    flexDirection: 'row',
    height: TITLE_BLOCK,
    borderWidth: RULE.light,
    borderColor: INK.ink,
    overflow: 'hidden',
  },
  cell: { paddingHorizontal: 6, paddingVertical: 4, borderColor: INK.ink },
  key: { fontSize: 7.5, lineHeight: 10 / 7.5, color: INK.ink3 },
  value: { fontSize: 8.5, lineHeight: 11 / 8.5, fontWeight: 600, maxLines: 2, textOverflow: 'ellipsis' },
});

function Mark() {
  return (
    <Svg viewBox="0 0 24 24" style={{ width: 15, height: 15 }}>
      <Path
        d="M15.65 7.18A7.5 7.5 0 1 0 15.2 17.3L22 10.5"
        fill="none"
        stroke={INK.ink}
        strokeWidth={1.75}
        strokeLinecap="round"
      />
      <Path d="M12.9 17.3a2.3 2.3 0 1 0 4.6 0a2.3 2.3 0 1 0 -4.6 0Z" fill={INK.ink} />
    </Svg>
  );
}

/** Head of every page: the mark, and what the memo is. */
export function Head({ status }: { status: string }) {
  return (
    <View fixed style={s.head}>
      <View style={s.brand}>
        <Mark />
        <Text style={s.name}>Spinward</Text>
      </View>
      <Text style={s.status}>{status}</Text>
    </View>
  );
}

/** Foot of every page: what the figures rest on, and the page of how many. */
export function Foot({ text, paperHeight }: { text: string; paperHeight: number }) {
  return (
    <View fixed style={[s.foot, { top: paperHeight - FOOT_LINE - FOOT_HEIGHT }]}>
      <Text style={s.footText}>{text}</Text>
      <Text style={s.page} render={({ pageNumber, totalPages }) => `${pageNumber} of ${totalPages}`} />
    </View>
  );
}

function TitleCells({ block }: { block: MemoTitleBlock }) {
  const cells: [string, string, number][] = [
    ['Study', block.study, 3.2],
    ['Memo', block.memo, 1.1],
    ['Date, UTC', block.date, 1.2],
    ['Revision', String(block.revision), 0.9],
    ['Prepared', block.prepared, 2.2],
  ];
  return (
    <View style={s.cells}>
      {cells.map(([key, value, share], index) => (
        <View key={key} style={[s.cell, { flex: share, borderLeftWidth: index === 0 ? 0 : RULE.light }]}>
          <Text style={s.key}>{key}</Text>
          <Text style={s.value}>{value}</Text>
        </View>
      ))}
    </View>
  );
}

interface FirstFootProps {
  block: MemoTitleBlock;
  caution: MemoCaution | undefined;
  paperHeight: number;
}

/**
 * The foot of the first page, as on a drawing sheet: its caution and the title block. It is fixed and drawn on the
 * first page alone: a block below the text area that isn't fixed would move on from page to page for ever.
 */
export function FirstFoot({ block, caution, paperHeight }: FirstFootProps) {
  return (
    <View
      fixed
      style={[s.block, { top: paperHeight - MARGIN.foot - FIRST_FOOT }]}
      render={({ subPageNumber }) =>
        subPageNumber === 1 ? (
          <>
            {caution && <Caution caution={caution} />}
            <TitleCells block={block} />
          </>
        ) : null
      }
    />
  );
}

/** What every page shares. @param footRoom left free above the foot margin, points. */
export function pageStyle(footRoom: number) {
  return {
    fontFamily: SANS,
    color: INK.ink,
    paddingTop: MARGIN.head,
    paddingLeft: MARGIN.left,
    paddingRight: MARGIN.right,
    paddingBottom: MARGIN.foot + footRoom,
  };
}
