import { z } from 'zod';
import {
  idSchema,
  LENS_IMPORT_MAX_BYTES,
  lensDetailSchema,
  lensImportQuerySchema,
  lensImportResultSchema,
  lensInputSchema,
  lensSchema,
  pageOf,
  paths,
} from '@/shared/contract';
import { getPractice } from '@/server/features/practice/practice.service';
import { ProblemError } from '@/server/http/problem';
import { created, file, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { checkLenses, lensTemplateCsv, readLensFile, storeLenses } from './lens-import.service';
import { changeLensAsSeen, createLens, getLensDetail, listLenses } from './lens.service';

const CSV = 'text/csv; charset=utf-8';
const byId = z.object({ id: idSchema });

export function lensRoutes(): Route[] {
  return [...readingRoutes(), ...changingRoutes(), importRoute()];
}

function readingRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.lenses(),
      access: 'lens.read',
      summary: 'The whole catalogue by name, retired models too',
      reply: pageOf(lensSchema),
      handle: async () => json({ items: await listLenses() }),
    }),
    defineRoute({
      method: 'get',
      path: paths.lens(':id'),
      access: 'lens.read',
      summary: 'One model with the history of its constants',
      params: byId,
      reply: lensDetailSchema,
      handle: async ({ params }) => {
        const lens = await getLensDetail(params.id);
        return json(lens, { version: lens.version });
      },
    }),
    defineRoute({
      method: 'get',
      path: paths.lensTemplate(),
      access: 'lens.read',
      summary: 'The empty template of a catalogue file',
      reply: CSV,
      handle: () =>
        file({ bytes: lensTemplateCsv(), contentType: CSV, fileName: 'landfall-lens-template.csv' }),
    }),
  ];
}

function changingRoutes(): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: paths.lenses(),
      access: 'lens.write',
      summary: 'Add a model',
      body: lensInputSchema,
      reply: lensDetailSchema,
      handle: async ({ body, write }) => {
        const { isDemo } = await getPractice();
        return write(async (act) => {
          const lens = await createLens(act, body, { isDemo });
          return created(lens, { location: paths.lens(lens.id), version: lens.version });
        });
      },
    }),
    defineRoute({
      method: 'put',
      path: paths.lens(':id'),
      access: 'lens.write',
      summary: 'Change a model; replaced constants stay in its history',
      params: byId,
      body: lensInputSchema,
      reply: lensDetailSchema,
      handle: ({ params, body, ifMatch, write }) =>
        write(async (act) => {
          const lens = await changeLensAsSeen(act, { id: params.id, ifMatch, input: body });
          return json(lens, { version: lens.version });
        }),
    }),
  ];
}

function importRoute(): Route {
  return defineRoute({
    method: 'post',
    path: paths.lensImport(),
    access: 'lens.write',
    summary: 'Check (dryRun=1) or store a catalogue file',
    upload: { field: 'file', maxBytes: LENS_IMPORT_MAX_BYTES },
    query: lensImportQuerySchema,
    reply: lensImportResultSchema,
    handle: async ({ upload, query, write }) => {
      if (!upload) throw new ProblemError('bad-request');
      const read = readLensFile(upload.bytes);
      if (query.dryRun === '1') return json(await checkLenses(read));
      const { isDemo } = await getPractice();
      return write(async (act) => json(await storeLenses(act, read, { isDemo })));
    },
  });
}
