import { StyleSheet, Text, View } from '@react-pdf/renderer';
import type { MemoCell, MemoRow, MemoTable } from '#contract/memo.ts';
import { padded, runsOf, snapped, type Column, type Run } from './columns.ts';
import { INK, MONO, ROW, RULE, TYPE } from './theme.ts';

/** More columns than this are set a size smaller. */
const DENSE_FROM = 10;
/** What has to fit under a caption for the table to start on this page: its headings and two rows. */
const START = 72;

const s = StyleSheet.create({
  after: { height: 4 },
  caption: { ...TYPE.caption, marginTop: 10, marginBottom: 4 },
  head: {
    flexDirection: 'row',
    alignItems: 'flex-end',
    borderTopWidth: RULE.heavy,
    borderBottomWidth: RULE.light,
    borderColor: INK.ink,
    paddingVertical: 3,
  },
  row: { flexDirection: 'row', alignItems: 'center', minHeight: ROW, borderColor: INK.rule },
  edge: { position: 'absolute', left: 0, top: 0, bottom: 0, width: 2.4, backgroundColor: INK.signal },
  unit: { ...TYPE.dense, color: INK.ink3 },
  end: { borderBottomWidth: RULE.heavy, borderColor: INK.ink },
  words: { paddingLeft: 3, paddingVertical: 2 },
  note: { ...TYPE.note, color: INK.ink2, marginTop: 3 },
});

type Type = { fontSize: number; lineHeight: number };

/** Room at the left of a column; words that follow figures are clear of them by the figures' own padding. */
const GAP = 3;

function Heading({ columns, type }: { columns: readonly Column[]; type: Type }) {
  return (
    <View fixed style={s.head}>
      {columns.map((column, at) => {
        const textAlign = column.align;
        return (
          <View key={at} style={{ width: column.width, paddingLeft: GAP, paddingRight: roomAfter(column) }}>
            {column.heading !== '' && (
              <Text style={{ ...type, fontWeight: 600, textAlign }}>{column.heading}</Text>
            )}
            {column.unit !== '' && <Text style={[s.unit, { textAlign }]}>{column.unit}</Text>}
          </View>
        );
      })}
    </View>
  );
}

const roomAfter = ({ align, width, characters }: Column): number =>
  align === 'right' ? width / characters : GAP;

const inkOf = (cell: Pick<MemoCell, 'strong'>, mark: MemoRow['mark']) => ({
  fontWeight: cell.strong || mark === 'leads' ? (600 as const) : (400 as const),
  color: mark === 'leads' && cell.strong ? INK.signal : mark === 'set-aside' ? INK.ink3 : INK.ink,
});

function Figures({
  run,
  columns,
  mark,
  type,
}: {
  run: Run;
  columns: readonly Column[];
  mark: MemoRow['mark'];
  type: Type;
}) {
  // The first figure's room is a padding: a line's leading spaces are not printed.
  const first = columns[run.from];
  const before = (first?.characters ?? 1) - 1 - (run.cells[0]?.text.length ?? 0);
  const paddingLeft = before * ((first?.width ?? 0) / (first?.characters ?? 1));
  const pieces: { text: string; strong: boolean }[] = [];
  run.cells.forEach((cell, index) => {
    const column = columns[run.from + index];
    const strong = cell.strong === true;
    const text = column === undefined ? '' : index === 0 ? `${cell.text} ` : padded(cell, column);
    const last = pieces.at(-1);
    if (last?.strong === strong) last.text += text;
    else pieces.push({ text, strong });
  });
  return (
    <Text
      style={{ ...type, ...inkOf({ strong: false }, mark), width: run.width, paddingLeft, fontFamily: MONO }}
    >
      {pieces.map(({ text, strong }, index) => {
        const shown = index === pieces.length - 1 ? text.trimEnd() : text;
        return strong ? (
          <Text key={index} style={inkOf({ strong }, mark)}>
            {shown}
          </Text>
        ) : (
          shown
        );
      })}
    </Text>
  );
}

function Words({
  run,
  columns,
  mark,
  type,
}: {
  run: Run;
  columns: readonly Column[];
  mark: MemoRow['mark'];
  type: Type;
}) {
  const [cell] = run.cells;
  const column = columns[run.from];
  if (!cell || !column) return null;
  const align = cell.span === undefined ? column.align : 'left';
  return (
    <Text
      style={{
        ...type,
        ...s.words,
        ...inkOf(cell, mark),
        width: run.width,
        textAlign: align,
        paddingRight: align === 'right' ? roomAfter(column) : GAP,
      }}
    >
      {cell.text}
    </Text>
  );
}

/** One row, never split. */
function Row({
  row,
  last,
  columns,
  type,
}: {
  row: MemoRow;
  last: boolean;
  columns: readonly Column[];
  type: Type;
}) {
  return (
    <View wrap={false} style={[s.row, last ? s.end : { borderBottomWidth: RULE.hair }]}>
      {row.mark === 'leads' && <View style={s.edge} />}
      {runsOf(row, columns).map((run) => {
        const Cells = run.padded ? Figures : Words;
        return <Cells key={run.from} run={run} columns={columns} mark={row.mark} type={type} />;
      })}
    </View>
  );
}

/**
 * A numbered table: breaks between rows, repeats its headings on every page it reaches, never splits a row. Caption
 * and notes stand beside the rows' container and not in it: so the caption moves on with the rows, and a note that
 * falls on the next page brings no headings with it.
 */
export function Table({ table, width }: { table: MemoTable; width: number }) {
  const type = table.columns.length >= DENSE_FROM ? TYPE.dense : TYPE.table;
  const columns = snapped(table.columns, width, type.fontSize);
  return (
    <>
      <Text style={s.caption} minPresenceAhead={START}>
        {`Table ${table.number}. ${table.caption}`}
      </Text>
      <View>
        <Heading columns={columns} type={type} />
        {table.rows.map((row, at) => (
          <Row key={at} row={row} last={at === table.rows.length - 1} columns={columns} type={type} />
        ))}
      </View>
      {table.notes.map((note, at) => (
        <Text key={at} style={s.note}>
          {note}
        </Text>
      ))}
      <View style={s.after} />
    </>
  );
}
