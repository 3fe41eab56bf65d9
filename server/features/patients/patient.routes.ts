import { z } from 'zod';
import {
  idSchema,
  pageOf,
  pageQuerySchema,
  paths,
  patientDetailSchema,
  patientInputSchema,
  patientListItemSchema,
  patientQuerySchema,
} from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { getPractice } from '@/server/features/practice/practice.service';
import { created, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { correctPatient, listPatients, registerPatient, viewPatient } from './patient.service';

const byId = z.object({ id: idSchema });

export function patientRoutes({ clock }: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.patients(),
      access: 'patient.read',
      summary: 'Patients by name, found by name, record number or birth date',
      query: pageQuerySchema.extend(patientQuerySchema.shape),
      reply: pageOf(patientListItemSchema),
      handle: async ({ query }) => json(await listPatients(clock, query)),
    }),
    defineRoute({
      method: 'post',
      path: paths.patients(),
      access: 'patient.write',
      summary: 'Register a patient',
      body: patientInputSchema,
      reply: patientDetailSchema,
      handle: async ({ body, write }) => {
        const { isDemo } = await getPractice();
        return write(async (act) => {
          const patient = await registerPatient(act, body, { isDemo });
          return created(patient, { location: paths.patient(patient.id), version: patient.version });
        });
      },
    }),
    defineRoute({
      method: 'get',
      path: paths.patient(':id'),
      access: 'patient.read',
      summary: 'One patient with where the eyes stand',
      params: byId,
      reply: patientDetailSchema,
      handle: ({ params, write }) =>
        write(async (act) => {
          const patient = await viewPatient(act, params.id);
          return json(patient, { version: patient.version });
        }),
    }),
    defineRoute({
      method: 'put',
      path: paths.patient(':id'),
      access: 'patient.write',
      summary: 'Correct a patient',
      params: byId,
      body: patientInputSchema,
      reply: patientDetailSchema,
      handle: ({ params, body, ifMatch, write }) =>
        write(async (act) => {
          const patient = await correctPatient(act, { id: params.id, ifMatch, input: body });
          return json(patient, { version: patient.version });
        }),
    }),
  ];
}
