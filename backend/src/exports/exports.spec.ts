import type { ComplianceView } from '@shared/contract';
import { parse } from 'csv-parse/sync';
import { execFileSync } from 'node:child_process';
import * as fs from 'node:fs';
import * as os from 'node:os';
import * as path from 'node:path';
import { createTestApp, type TestApp } from '../../test/app';
import { createTestStudy, edit, type TestStudy, writeSmallStudy } from '../../test/studies';
import { MATRIX_COLUMNS } from './matrix-table';

let testApp: TestApp;
let study: TestStudy;
let directory: string;
let view: ComplianceView;

/** Texts that a spreadsheet would run, by the list of OWASP's CSV injection page (from memory), and what must stay a number. */
const HOSTILE = [
  '=HYPERLINK("http://127.0.0.1/","x")',
  '+1+1',
  '-2+3',
  '@SUM(1)',
  '\t=1',
  'a "quoted", text\r\nof two lines',
];

beforeAll(async () => {
  directory = fs.mkdtempSync(path.join(os.tmpdir(), 'deltaproof-export-'));
  testApp = await createTestApp();
  study = await createTestStudy(testApp);
  await writeSmallStudy(study);
  await edit(study, study.analyst, [
    { type: 'quantity.create', symbol: 'x', name: 'Drift', unit: 'mm', value: { text: '-4.2', unit: 'mm' } },
  ]);
  const drift = (
    (await study.owner.agent.get(`/api/studies/${study.key}/quantities`)).body.rows as { id: string; symbol: string }[]
  ).find((row) => row.symbol === 'x')!;
  const written = await edit(
    study,
    study.owner,
    HOSTILE.map((title) => ({
      type: 'requirement.create',
      prefix: 'HST',
      title,
      text: `${title} shall stay text.`,
      level: 'vehicle',
      limit: { relation: 'at most', value: { text: '-1', unit: 'mm' } },
    })),
  );
  await edit(study, study.analyst, [
    {
      type: 'analysis.create',
      id: '01890000-0000-7000-8000-000000000001',
      kind: 'formula',
      name: 'Drift',
      inputs: [{ name: 'x', from: { quantityId: drift.id } }],
      lines: [{ name: 'y', expression: 'x', unit: 'mm' }],
    },
    {
      type: 'verification.link',
      requirementId: written.created[0]!.id,
      method: 'analysis',
      analysisId: '01890000-0000-7000-8000-000000000001',
      output: 'y',
    },
  ]);
  view = (await study.owner.agent.get(`/api/studies/${study.key}/compliance`)).body as ComplianceView;
});
afterAll(async () => {
  await testApp.close();
  fs.rmSync(directory, { recursive: true, force: true });
});

const file = async (format: string, at = 'now'): Promise<Buffer> => {
  const answer = await study.reader.agent
    .get(`/api/studies/${study.key}/export/${format}`)
    .query({ at })
    .buffer(true)
    .parse((response, done) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.on('end', () => done(null, Buffer.concat(parts)));
    });
  expect(answer.status).toBe(200);
  expect(answer.headers['content-disposition']).toMatch(new RegExp(`^attachment; filename="[a-z0-9-]+\\.${format}"$`));
  return answer.body as Buffer;
};
const convert = (name: string, content: Buffer, to: string): string => {
  const source = path.join(directory, name);
  fs.writeFileSync(source, content);
  execFileSync(
    'soffice',
    [
      '--headless',
      `-env:UserInstallation=file://${directory}/profile`,
      '--convert-to',
      to,
      '--outdir',
      directory,
      source,
    ],
    { stdio: 'ignore', timeout: 120_000 },
  );
  return path.join(directory, `${path.parse(name).name}.${to.split(':')[0]}`);
};

describe('the matrix as CSV', () => {
  it('is strict RFC 4180: CRLF, one header record, every record alike in length, quotes doubled', async () => {
    const text = (await file('csv')).toString('utf8');
    expect(text.replace(/"(?:[^"]|"")*"/g, '')).not.toMatch(/(?<!\r)\n/);
    // csv-parse in its strict settings: no relaxed quotes, no relaxed column count.
    const records: string[][] = parse(text, {
      record_delimiter: '\r\n',
      relax_quotes: false,
      relax_column_count: false,
    });
    expect(records).toHaveLength(view.rows.length + 1);
    expect(records[0]!.slice(0, MATRIX_COLUMNS.length)).toEqual(MATRIX_COLUMNS.map((column) => column.name));
    expect(records.slice(1).map((record) => record[0])).toEqual(view.rows.map((row) => row.key));
  });

  it('holds text that looks like a formula inert, and numbers as numbers', async () => {
    const records: Record<string, string>[] = parse((await file('csv')).toString('utf8'), { columns: true });
    for (const record of records.filter((one) => one['Identifier']!.startsWith('HST'))) {
      expect(record['Title']).not.toMatch(/^[=+\-@\t\r]/);
    }
    const measured = records.find((record) => record['Title']!.includes('HYPERLINK'))!;
    expect([measured['Required value'], measured['Assessed value']]).toEqual(['-1', '-4.2']);
  });
});

describe('the matrix as a workbook', () => {
  it('opens in LibreOffice with every row, and with no formula in it', async () => {
    const csv = fs.readFileSync(
      convert(
        'matrix.xlsx',
        await file('xlsx'),
        'csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,2',
      ).replace(/\.csv$/, '-Matrix.csv'),
      'utf8',
    );
    const records: Record<string, string>[] = parse(csv, { columns: true, relax_column_count: false });
    expect(records.map((record) => record['Identifier'])).toEqual(view.rows.map((row) => row.key));
    const hostile = records.find((record) => record['Title']!.includes('HYPERLINK'))!;
    expect(hostile['Title']).toBe(HOSTILE[0]);
    expect(Number(hostile['Assessed value'])).toBe(-4.2);
  }, 180_000);
});

describe('the matrix as a document', () => {
  it('opens in LibreOffice; its rows are those of the grid, in order, with the caution and the word predicted', async () => {
    const pdf = convert('matrix.docx', await file('docx'), 'pdf');
    const text = execFileSync('pdftotext', ['-layout', pdf, '-'], { encoding: 'utf8' });
    const keys = [...text.matchAll(/\b(VEH|HST)-\d{3}\b/g)].map((match) => match[0]);
    expect([...new Set(keys)]).toEqual(view.rows.map((row) => row.key));
    expect(text).toContain('Predicted compliance');
    expect(text).toContain('does not replace licensed engineering');
    expect(text).not.toMatch(/\bverified\b/i);
  }, 180_000);
});

describe('a baseline', () => {
  it('is exported again with the same content after the study has moved on', async () => {
    const ids = view.rows.filter((row) => row.key.startsWith('VEH')).map((row) => row.id);
    await edit(
      study,
      study.owner,
      ids.map((id) => ({ type: 'requirement.submit', id, version: 1 })),
    );
    await edit(study, study.chair, [{ type: 'baseline.take', name: 'Frozen', review: 'MDR', requirementIds: ids }]);
    const before = (await file('csv', 'baseline:B1')).toString('utf8');
    const impulse = (
      (await study.owner.agent.get(`/api/studies/${study.key}/quantities`)).body.rows as {
        id: string;
        symbol: string;
      }[]
    ).find((row) => row.symbol === 'I_sp')!;
    await edit(study, study.analyst, [
      { type: 'quantity.set', id: impulse.id, version: 1, value: { text: '6100', unit: 's' } },
    ]);
    expect((await file('csv', 'baseline:B1')).toString('utf8')).toBe(before);
    expect((await file('csv')).toString('utf8')).not.toBe(before);
  });
});
