import { type ComplianceView, StandpointText } from '@shared/contract';
import { complianceView } from '@shared/study';
import * as z from 'zod';
import { matrixCsv } from '../../exports/matrix-csv';
import { matrixDocx } from '../../exports/matrix-docx';
import { matrixFileName } from '../../exports/matrix-table';
import { matrixXlsx } from '../../exports/matrix-xlsx';
import { type Route, STREAMED, studyRead } from '../../middleware/routes';

interface Format {
  readonly type: string;
  readonly write: (view: ComplianceView) => Buffer | Promise<Buffer>;
}

const FORMATS = {
  csv: { type: 'text/csv; charset=utf-8; header=present', write: matrixCsv },
  xlsx: { type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', write: matrixXlsx },
  docx: { type: 'application/vnd.openxmlformats-officedocument.wordprocessingml.document', write: matrixDocx },
} as const satisfies Record<string, Format>;

/** The compliance matrix as a file, from any standpoint. */
export const exportRoutes: readonly Route[] = [
  studyRead({
    path: '/api/studies/:study/export/:format',
    summary: 'The compliance matrix as DOCX, XLSX or CSV',
    permission: 'member',
    params: z.strictObject({ format: z.enum(['csv', 'xlsx', 'docx']) }),
    query: z.strictObject({ at: StandpointText }),
    handler: async ({ services, study, person, params, query, response }) => {
      const view = complianceView(await services.standpoints.context(study, person, query.at));
      const { type, write } = FORMATS[params.format];
      const file = await write(view);
      response
        .status(200)
        .set({
          'Content-Type': type,
          'Content-Disposition': `attachment; filename="${matrixFileName(view)}.${params.format}"`,
          'X-Content-Type-Options': 'nosniff',
          'Cache-Control': 'no-store',
        })
        .end(file);
      return STREAMED;
    },
  }),
];
