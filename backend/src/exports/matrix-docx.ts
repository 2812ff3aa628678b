import type { ComplianceView, MatrixRow } from '@shared/contract';
import {
  AlignmentType,
  BorderStyle,
  Document,
  Footer,
  HeadingLevel,
  Packer,
  PageNumber,
  PageOrientation,
  Paragraph,
  Table,
  TableCell,
  TableLayoutType,
  TableRow,
  TextRun,
  WidthType,
} from 'docx';
import { assessedInWords, marginInWords, requiredInWords } from './matrix-words';
import { headerLines, statement } from './matrix-table';

/** One column of the printed table; each of its lines is one item of the matrix, named in the heading. */
interface PrintedColumn {
  readonly heading: string;
  /** Twentieths of a point. */
  readonly width: number;
  readonly lines: (row: MatrixRow) => readonly string[];
}

const COLUMNS: readonly PrintedColumn[] = [
  {
    heading: 'Identifier, version, parents',
    width: 1500,
    lines: (row) => [
      row.key,
      `version ${row.version}`,
      row.parents.length > 0 ? `from ${row.parents.join(', ')}` : 'top level',
    ],
  },
  { heading: 'Requirement', width: 4300, lines: (row) => [row.title, row.text] },
  { heading: 'Required value', width: 1700, lines: (row) => [requiredInWords(row)] },
  {
    heading: 'Method, level, stage, success criterion',
    width: 1900,
    lines: (row) => [row.method, row.level, row.stage, row.criterion],
  },
  { heading: 'Assessed value ± U', width: 1700, lines: (row) => [assessedInWords(row)] },
  { heading: 'Margin, policy', width: 2000, lines: (row) => [marginInWords(row), row.policy] },
  {
    heading: 'Verdict, compliance, basis',
    width: 1700,
    lines: (row) => [row.verdict, `compliance ${row.compliance}`, row.basis ?? ''],
  },
  { heading: 'Evidence, placard', width: 2000, lines: (row) => [row.evidence, row.placard] },
  { heading: 'Departure', width: 1600, lines: (row) => [row.departure] },
  { heading: 'Close-out, reason', width: 2000, lines: (row) => [row.closeOut, row.reason] },
  { heading: 'Owner, signature', width: 1600, lines: (row) => [row.owner, row.signature] },
];

const FONT = 'Arial';
const SMALL = 16;
const rule = { style: BorderStyle.SINGLE, size: 4, color: 'B9B2A3' };
const none = { style: BorderStyle.NONE, size: 0, color: 'FFFFFF' };

function paragraph(text: string, options: { bold?: boolean; size?: number } = {}): Paragraph {
  return new Paragraph({
    spacing: { after: 20 },
    children: [new TextRun({ text, font: FONT, size: options.size ?? SMALL, bold: options.bold ?? false })],
  });
}

function cell(lines: readonly string[], width: number, bold = false): TableCell {
  const said = lines.filter((line) => line !== '');
  return new TableCell({
    width: { size: width, type: WidthType.DXA },
    margins: { top: 40, bottom: 40, left: 60, right: 60 },
    borders: { top: rule, bottom: rule, left: none, right: none },
    children: (said.length > 0 ? said : ['']).map((line, index) => paragraph(line, { bold: bold || index === 0 })),
  });
}

/** The matrix as a document on A3 landscape: caution first, what it is of, then the rows, bad news first, headings repeated. */
export async function matrixDocx(view: ComplianceView): Promise<Buffer> {
  const { header, rows } = view;
  const about = headerLines(view).map(
    ([name, value]) =>
      new TableRow({
        cantSplit: true,
        children: [
          cell([name], 3000),
          new TableCell({
            width: { size: 19000, type: WidthType.DXA },
            borders: { top: rule, bottom: rule, left: none, right: none },
            children: [paragraph(value)],
          }),
        ],
      }),
  );
  const head = new TableRow({
    tableHeader: true,
    cantSplit: true,
    children: COLUMNS.map(({ heading, width }) => cell([heading], width, true)),
  });
  const body = rows.map(
    (row) =>
      new TableRow({ cantSplit: true, children: COLUMNS.map((column) => cell(column.lines(row), column.width)) }),
  );
  const document = new Document({
    creator: 'Deltaproof',
    title: `Compliance matrix of ${header.study}`,
    description: statement(header),
    styles: { default: { document: { run: { font: FONT, size: 18 } } } },
    sections: [
      {
        properties: {
          page: {
            size: { orientation: PageOrientation.LANDSCAPE, width: 16838, height: 23811 },
            margin: { top: 900, bottom: 900, left: 900, right: 900 },
          },
        },
        footers: {
          default: new Footer({
            children: [
              new Paragraph({
                alignment: AlignmentType.LEFT,
                children: [
                  new TextRun({
                    text: `${header.studyKey} · ${header.standpoint} · ${header.basis} · page `,
                    font: FONT,
                    size: SMALL,
                  }),
                  new TextRun({
                    children: [PageNumber.CURRENT, ' of ', PageNumber.TOTAL_PAGES],
                    font: FONT,
                    size: SMALL,
                  }),
                ],
              }),
            ],
          }),
        },
        children: [
          new Paragraph({
            heading: HeadingLevel.HEADING_1,
            children: [
              new TextRun({
                text: `Compliance matrix: ${header.study}`,
                font: FONT,
                size: 36,
                bold: true,
                color: '17222E',
              }),
            ],
          }),
          paragraph(statement(header), { bold: true, size: 20 }),
          paragraph(header.caution, { size: 20 }),
          new Paragraph({ children: [] }),
          new Table({
            width: { size: 22000, type: WidthType.DXA },
            columnWidths: [3000, 19000],
            layout: TableLayoutType.FIXED,
            rows: about,
          }),
          new Paragraph({
            heading: HeadingLevel.HEADING_2,
            spacing: { before: 300, after: 100 },
            children: [
              new TextRun({ text: 'Rows, bad news first', font: FONT, size: 26, bold: true, color: '17222E' }),
            ],
          }),
          new Table({
            width: { size: 22000, type: WidthType.DXA },
            columnWidths: COLUMNS.map(({ width }) => width),
            layout: TableLayoutType.FIXED,
            rows: [head, ...body],
          }),
        ],
      },
    ],
  });
  return Packer.toBuffer(document);
}
