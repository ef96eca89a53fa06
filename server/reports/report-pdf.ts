import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces.js'
import type { AnalysisReport, ReportBlock, ReportMark, ReportSection } from '#shared/words/report/document.ts'
import { forestSvg } from '#shared/charts/forest-svg.ts'
import { paperTheme } from '#shared/charts/paper-theme.ts'
import { inOneFont } from './draw-charts.ts'
import { printed } from './printed.ts'

/** Pictures of a report by the block they belong to; null where there is none to draw. */
export interface ReportPictures {
  sketch: string | null
  plot: (analysisId: number | null) => string | null
}

/** Points between the margins of an A4 page. */
const WIDTH = 595.28 - 2 * 48
const severityColours: Record<ReportMark['severity'], string> = {
  good: '#2E7D5B',
  note: paperTheme.deepWater,
  caution: '#8F5A00',
  bad: '#B3261E',
}

/** The report as a PDF document: A4, its name and page number under every page. */
export function reportDefinition(report: AnalysisReport, pictures: ReportPictures): TDocumentDefinitions {
  return {
    pageSize: 'A4',
    pageMargins: [48, 52, 48, 56],
    info: { title: printed(`${report.kind}: ${report.title}`), creator: 'Basinbook', producer: 'Basinbook' },
    defaultStyle: { font: 'Roboto', fontSize: 9, color: paperTheme.ink, lineHeight: 1.2 },
    styles: {
      kind: { fontSize: 8, color: paperTheme.inkSoft },
      title: { fontSize: 18, bold: true },
      section: { fontSize: 12, bold: true, margin: [0, 14, 0, 4] },
      caption: { fontSize: 8, color: paperTheme.inkSoft, margin: [0, 6, 0, 2] },
      head: { fontSize: 8, bold: true },
    },
    content: [
      { text: printed(report.kind), style: 'kind' },
      { text: printed(report.title), style: 'title' },
      { text: printed(report.facts), color: paperTheme.inkSoft },
      ...report.sections.flatMap((section) => sectionContent(section, pictures)),
    ],
    footer: (page, pages) => ({
      columns: [
        { text: printed(report.made), width: '*' },
        { text: `${page} / ${pages}`, width: 'auto' },
      ],
      fontSize: 7,
      color: paperTheme.inkSoft,
      margin: [48, 20, 48, 0],
    }),
  }
}

/** Rows of a table that stay on one page with the heading above them. */
const TOGETHER = 12

/** A heading never stands alone at the foot of a page, unless what follows is longer than one. */
function sectionContent({ title, blocks }: ReportSection, pictures: ReportPictures): Content[] {
  const heading: Content = { text: printed(title), style: 'section' }
  const [first, ...rest] = blocks
  if (!first) return [heading]
  if (blocks.every(({ kind }) => kind === 'text'))
    return [{ stack: [heading, ...blocks.flatMap((block) => blockContent(block, pictures))], unbreakable: true }]
  const opening = [heading, ...blockContent(first, pictures)]
  const isLong = first.kind === 'table' && first.rows.length > TOGETHER
  return [
    ...(isLong ? opening : [{ stack: opening, unbreakable: true }]),
    ...rest.flatMap((block) => blockContent(block, pictures)),
  ]
}

function blockContent(block: ReportBlock, pictures: ReportPictures): Content[] {
  switch (block.kind) {
    case 'facts':
      return [factsTable(block)]
    case 'text':
      return [{ text: printed(block.text), margin: [0, 4, 0, 2] }]
    case 'table':
      return [{ text: printed(block.caption), style: 'caption' }, dataTable(block)]
    case 'marked':
      return [markedList(block)]
    case 'sketch':
      return pictures.sketch === null ? [] : [{ svg: pictures.sketch, width: WIDTH * 0.62, margin: [0, 4, 0, 4] }]
    case 'plot':
      return plotContent(block, pictures)
    case 'forest':
      return forestContent(block)
  }
}

function plotContent({ analysisId, caption }: ReportBlock & { kind: 'plot' }, pictures: ReportPictures): Content[] {
  return captioned(caption, pictures.plot(analysisId))
}

function forestContent({ caption, rows }: ReportBlock & { kind: 'forest' }): Content[] {
  const svg = forestSvg(rows, paperTheme)
  return captioned(caption, svg && inOneFont(svg))
}

function captioned(caption: string, svg: string | null): Content[] {
  if (svg === null) return []
  return [
    {
      stack: [
        { text: printed(caption), style: 'caption' },
        { svg, width: WIDTH },
      ],
      unbreakable: true,
    },
  ]
}

const factsTable = ({ facts }: ReportBlock & { kind: 'facts' }): Content => ({
  layout: 'noBorders',
  table: {
    widths: [130, '*'],
    body: facts.map(({ label, text }) => [
      { text: printed(label), color: paperTheme.inkSoft },
      { text: printed(text) },
    ]),
  },
})

const dataTable = ({ head, rows }: ReportBlock & { kind: 'table' }): Content => {
  const cell = (text: string) => ({ text: printed(text, head.length) })
  return {
    layout: {
      hLineWidth: () => 0.5,
      vLineWidth: () => 0,
      hLineColor: () => paperTheme.line,
      paddingLeft: (column) => (column === 0 ? 0 : 6),
    },
    table: {
      headerRows: 1,
      dontBreakRows: true,
      widths: head.map(() => '*'),
      body: [head.map((text) => ({ ...cell(text), style: 'head' })), ...rows.map((row) => row.map(cell))],
    },
  }
}

const markedList = ({ items }: ReportBlock & { kind: 'marked' }): Content => ({
  layout: 'noBorders',
  margin: [0, 6, 0, 0],
  table: {
    widths: [56, '*'],
    body: items.map(({ severity, word, text }) => [
      { text: printed(word), bold: true, color: severityColours[severity] },
      { text: printed(text) },
    ]),
  },
})
