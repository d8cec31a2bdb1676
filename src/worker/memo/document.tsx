import { Fragment } from 'react';
import { Document, Page, StyleSheet, Text, View } from '@react-pdf/renderer';
import type { MemoHeadline, MemoModel } from '#contract/memo.ts';
import { Block, Runs } from './blocks.tsx';
import { isFigure } from './columns.ts';
import { FIRST_FOOT, FirstFoot, Foot, Head, pageStyle } from './frame.tsx';
import { pageRuns, type Item } from './page-runs.ts';
import { INK, MARGIN, MONO, PAPER, SANS, TYPE } from './theme.ts';

const s = StyleSheet.create({
  finding: { ...TYPE.title, marginBottom: 4 },
  question: { ...TYPE.body, color: INK.ink2, marginBottom: 10 },
  opening: { flexDirection: 'row', gap: 24, marginBottom: 4 },
  headline: { width: 150, borderLeftWidth: 2.4, borderLeftColor: INK.ink, paddingLeft: 10, gap: 5 },
  label: { ...TYPE.note, color: INK.ink2 },
  figure: { fontSize: 14, lineHeight: 18 / 14, fontWeight: 600 },
  heading: { ...TYPE.heading, marginTop: 14, marginBottom: 5 },
});

function Headline({ items }: { items: MemoHeadline[] }) {
  const leads = items.some((item) => item.leads);
  return (
    <View style={[s.headline, leads ? { borderLeftColor: INK.signal } : {}]}>
      {items.map((item) => (
        <View key={item.label}>
          <Text style={s.label}>{item.label}</Text>
          <Text>
            <Text
              style={[
                s.figure,
                { fontFamily: isFigure(item.figure) ? MONO : SANS },
                item.leads ? { color: INK.signal } : {},
              ]}
            >
              {item.figure}
            </Text>
            <Text style={s.label}>{item.note === '' ? '' : `  ${item.note}`}</Text>
          </Text>
        </View>
      ))}
    </View>
  );
}

function Opening({ model }: { model: MemoModel }) {
  return (
    <>
      <Text style={s.finding}>{model.finding}</Text>
      <Text style={s.question}>{model.question}</Text>
      <View style={s.opening}>
        <View style={{ flex: 1 }}>
          {model.reasons.map((reason, at) => (
            <Text key={at} style={{ ...TYPE.body, marginBottom: 6 }}>
              <Runs text={reason} />
            </Text>
          ))}
        </View>
        {model.headline.length > 0 && <Headline items={model.headline} />}
      </View>
    </>
  );
}

function SectionHeading({ heading }: { heading: string }) {
  // The file's outline; the renderer's types know the property of pages alone.
  const outline = { bookmark: heading };
  return (
    <View minPresenceAhead={110} {...outline}>
      <Text style={s.heading}>{heading}</Text>
    </View>
  );
}

function Blocks({ items, width }: { items: readonly Item[]; width: number }) {
  return items.map(({ heading, block }, at) => (
    <Fragment key={at}>
      {heading !== null && <SectionHeading heading={heading} />}
      <Block block={block} width={width} />
    </Fragment>
  ));
}

/** The whole memo. Dates are the model's UTC day, so that a day's memo of the same inputs is the same file. */
export function MemoDocument({ model }: { model: MemoModel }) {
  const day = new Date(`${model.titleBlock.date}T00:00:00Z`);
  const paper = PAPER[model.paper];
  const size: [number, number] = [paper.width, paper.height];
  const width = paper.width - MARGIN.left - MARGIN.right;
  const [first, ...rest] = model.sections;
  // The first page's caution is pinned over the title block, so that it never stands on a page of its own.
  const caution = first?.blocks.find((block) => block.kind === 'caution');
  const opening = first?.blocks.filter((block) => block !== caution) ?? [];
  return (
    <Document
      title={model.documentTitle}
      author={model.titleBlock.organisation}
      subject={model.question}
      creator="Spinward"
      producer="Spinward"
      language="en"
      creationDate={day}
      modificationDate={day}
    >
      <Page size={size} style={pageStyle(FIRST_FOOT)}>
        <FirstFoot block={model.titleBlock} caution={caution} paperHeight={paper.height} />
        <Head status={model.status} />
        <Foot text={model.foot} paperHeight={paper.height} />
        <Opening model={model} />
        <Blocks items={opening.map((block) => ({ heading: null, block }))} width={width} />
      </Page>
      {pageRuns(rest).map((items, at) => (
        <Page key={at} size={size} style={pageStyle(8)}>
          <Head status={model.status} />
          <Foot text={model.foot} paperHeight={paper.height} />
          <Blocks items={items} width={width} />
        </Page>
      ))}
    </Document>
  );
}
