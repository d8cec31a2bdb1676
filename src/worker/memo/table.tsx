import { StyleSheet, Text, View } from '@react-pdf/renderer';
import type { MemoCell, MemoColumn, MemoRow, MemoTable } from '#contract/memo.ts';
import { INK, MONO, ROW, RULE, SANS, TYPE } from './theme.ts';

/** More columns than this are set a size smaller. */
const DENSE_FROM = 10;
/** What has to fit under a caption for the table to start on this page: its headings and two rows. */
const START = 72;

const s = StyleSheet.create({
  table: { marginTop: 10, marginBottom: 10 },
  caption: { ...TYPE.caption, marginBottom: 4 },
  head: {
    flexDirection: 'row',
    alignItems: 'flex-end',
    borderTopWidth: RULE.heavy,
    borderBottomWidth: RULE.light,
    borderColor: INK.ink,
    paddingVertical: 3,
  },
  row: { flexDirection: 'row', alignItems: 'center', minHeight: ROW, borderColor: INK.rule },
  cell: { paddingHorizontal: 3 },
  unit: { color: INK.ink3 },
  end: { borderTopWidth: RULE.heavy, borderColor: INK.ink },
  note: { ...TYPE.note, color: INK.ink2, marginTop: 3 },
});

/** Characters that the figure font has; anything else is set in the text font. */
const FIGURE = /^[ -~−–°±×·]*$/;
export const figureFont = (text: string): string => (FIGURE.test(text) ? MONO : SANS);

const width = (columns: readonly MemoColumn[], from: number, span: number): string => {
  const all = columns.reduce((sum, column) => sum + column.share, 0);
  const taken = columns.slice(from, from + span).reduce((sum, column) => sum + column.share, 0);
  return `${(100 * taken) / all}%`;
};

function Heading({ table, type }: { table: MemoTable; type: typeof TYPE.table | typeof TYPE.dense }) {
  return (
    <View fixed style={s.head}>
      {table.columns.map((column, at) => (
        <View key={at} style={[s.cell, { width: width(table.columns, at, 1) }]}>
          <Text style={{ ...type, fontWeight: 600, textAlign: column.align }}>{column.heading}</Text>
          {column.unit !== '' && (
            <Text style={[s.unit, { ...TYPE.dense, textAlign: column.align }]}>{column.unit}</Text>
          )}
        </View>
      ))}
    </View>
  );
}

function cellStyle(cell: MemoCell, column: MemoColumn, mark: MemoRow['mark']) {
  const figure = column.align === 'right' && cell.span === undefined;
  return {
    textAlign: cell.span === undefined ? column.align : ('left' as const),
    fontFamily: figure ? figureFont(cell.text) : SANS,
    fontWeight: cell.strong || mark === 'leads' ? (600 as const) : (400 as const),
    color: mark === 'leads' && cell.strong ? INK.signal : mark === 'set-aside' ? INK.ink3 : INK.ink,
  };
}

function Row({
  table,
  row,
  type,
}: {
  table: MemoTable;
  row: MemoRow;
  type: { fontSize: number; lineHeight: number };
}) {
  let at = 0;
  const cells = row.cells.map((cell) => {
    const from = at;
    at += cell.span ?? 1;
    return { cell, from };
  });
  const last = row === table.rows.at(-1);
  const edge = row.mark === 'leads' ? { borderLeftWidth: 2.4, borderLeftColor: INK.signal } : {};
  return (
    <View wrap={false} style={[s.row, { borderBottomWidth: last ? 0 : RULE.hair }, edge]}>
      {cells.map(({ cell, from }) => {
        const column = table.columns[from];
        if (!column) return null;
        return (
          <View key={from} style={[s.cell, { width: width(table.columns, from, cell.span ?? 1) }]}>
            <Text style={{ ...type, paddingVertical: 2, ...cellStyle(cell, column, row.mark) }}>
              {cell.text}
            </Text>
          </View>
        );
      })}
    </View>
  );
}

/** A numbered table: breaks between rows, repeats its headings on every page it reaches, never splits a row. */
export function Table({ table }: { table: MemoTable }) {
  const type = table.columns.length >= DENSE_FROM ? TYPE.dense : TYPE.table;
  return (
    <View style={s.table}>
      <Text style={s.caption} minPresenceAhead={START}>
        {`Table ${table.number}. ${table.caption}`}
      </Text>
      <View>
        <Heading table={table} type={type} />
        {table.rows.map((row, at) => (
          <Row key={at} table={table} row={row} type={type} />
        ))}
        <View style={s.end} />
      </View>
      {table.notes.map((note, at) => (
        <Text key={at} style={s.note}>
          {note}
        </Text>
      ))}
    </View>
  );
}
