import { z } from 'zod';
import {
  idSchema,
  IMPORT_MAX_BYTES,
  importRowPageSchema,
  importSchema,
  localDateOf,
  pageOf,
  pageQuerySchema,
  paths,
  ROW_OUTCOMES,
} from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { demoBiometryCsv } from '@/server/db/seeds/demo-biometry';
import { getPractice } from '@/server/features/practice/practice.service';
import { ProblemError } from '@/server/http/problem';
import { created, file, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { listImportRows } from './import-rows.service';
import {
  confirmImport,
  discardImport,
  downloadFile,
  getImport,
  listImports,
  sha256Of,
  uploadFile,
} from './import.service';
import { templateCsv } from './sample-files';

const CSV = 'text/csv; charset=utf-8';
const byId = z.object({ id: idSchema });

export function importRoutes(deps: Deps): Route[] {
  return [...sampleRoutes(deps), ...readingRoutes(deps), ...changingRoutes(deps)];
}

function sampleRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.importTemplate(),
      access: 'import.read',
      summary: 'The empty template of a biometry file',
      reply: CSV,
      handle: () =>
        file({ bytes: templateCsv(), contentType: CSV, fileName: 'landfall-biometry-template.csv' }),
    }),
    defineRoute({
      method: 'get',
      path: paths.importDemoFile(),
      access: 'import.read',
      summary: 'Biometry of invented people; only in the demonstration',
      reply: CSV,
      handle: async () => {
        const { isDemo, demoDay } = await getPractice();
        if (!isDemo) throw new ProblemError('not-found');
        const bytes = demoBiometryCsv(demoDay ?? localDateOf(deps.clock.now()));
        return file({ bytes, contentType: CSV, fileName: 'landfall-demo-biometry.csv' });
      },
    }),
  ];
}

function readingRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.imports(),
      access: 'import.read',
      summary: 'Uploaded biometry files, newest first',
      query: pageQuerySchema,
      reply: pageOf(importSchema),
      handle: async ({ query }) => json(await listImports(deps, query)),
    }),
    defineRoute({
      method: 'get',
      path: paths.import(':id'),
      access: 'import.read',
      summary: 'One upload, with the progress of running work',
      params: byId,
      reply: importSchema,
      handle: async ({ params }) => json(await getImport(deps, params.id)),
    }),
    defineRoute({
      method: 'get',
      path: paths.importRows(':id'),
      access: 'import.read',
      summary: 'Rows of an upload and what becomes of them',
      params: byId,
      query: pageQuerySchema.extend({ outcome: z.enum(ROW_OUTCOMES).optional() }),
      reply: importRowPageSchema,
      handle: async ({ params, query }) =>
        json(await listImportRows(deps, { importId: params.id, ...query })),
    }),
    defineRoute({
      method: 'get',
      path: paths.importFile(':id'),
      access: 'import.read',
      summary: 'The uploaded file, byte for byte',
      params: byId,
      reply: 'application/octet-stream',
      handle: ({ params, write }) =>
        write(async (act) => {
          const { name, bytes } = await downloadFile(act, params.id);
          return file({ bytes, contentType: 'application/octet-stream', fileName: name });
        }),
    }),
  ];
}

function changingRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: paths.imports(),
      access: 'measurement.write',
      summary: 'Upload a biometry file; it is checked and not stored yet',
      upload: { field: 'file', maxBytes: IMPORT_MAX_BYTES },
      reply: importSchema,
      handle: ({ upload, write }) => {
        if (!upload) throw new ProblemError('bad-request');
        const sha256 = sha256Of(upload.bytes);
        return write(async (act) => {
          const uploaded = await uploadFile(deps, act, { ...upload, sha256 });
          return created(uploaded, { location: paths.import(uploaded.id) });
        });
      },
    }),
    defineRoute({
      method: 'post',
      path: paths.importConfirm(':id'),
      access: 'measurement.write',
      summary: 'Store what the file adds',
      params: byId,
      reply: importSchema,
      handle: ({ params, write }) => write(async (act) => json(await confirmImport(deps, act, params.id))),
    }),
    defineRoute({
      method: 'post',
      path: paths.importDiscard(':id'),
      access: 'measurement.write',
      summary: 'Discard a file that is not stored',
      params: byId,
      reply: importSchema,
      handle: ({ params, write }) => write(async (act) => json(await discardImport(deps, act, params.id))),
    }),
  ];
}
