import { z } from 'zod';
import {
  eyeDeskSchema,
  eyeHistorySchema,
  eyeSchema,
  flagSchema,
  idSchema,
  measurementEntryRequestSchema,
  measurementSchema,
  paths,
  settlementInputSchema,
  sideSchema,
  type Side,
} from '@/shared/contract';
import { created, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { addMeasurement, settleFlag, viewEyeDesk } from './eye-desk.service';
import { recordHistory } from './eye-record.service';

const params = z.object({ patientId: idSchema, side: sideSchema });
/** The path with its place-holders. */
const SIDE = ':side' as Side;

export function eyeRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.eye(':patientId', SIDE),
      access: 'patient.read',
      summary: 'Everything about one eye and where it stands',
      params,
      reply: eyeDeskSchema,
      handle: ({ params: address, write }) =>
        write(async (act) => {
          const desk = await viewEyeDesk(act, address);
          return json(desk, { version: desk.eye.version });
        }),
    }),
    defineRoute({
      method: 'put',
      path: paths.eyeHistory(':patientId', SIDE),
      access: 'patient.write',
      summary: "Record the eye's history",
      params,
      body: eyeHistorySchema,
      reply: eyeSchema,
      handle: ({ params: address, body, ifMatch, write }) =>
        write(async (act) => {
          const eye = await recordHistory(act, { ...address, ifMatch, history: body });
          return json(eye, { version: eye.version });
        }),
    }),
    defineRoute({
      method: 'post',
      path: paths.eyeMeasurements(':patientId', SIDE),
      access: 'measurement.write',
      summary: 'Enter a measurement by hand, alone or in the place of another',
      params,
      body: measurementEntryRequestSchema,
      reply: measurementSchema,
      handle: ({ params: address, body, write }) =>
        write(async (act) => {
          const measurement = await addMeasurement(act, address, body);
          return created(measurement, { location: paths.measurement(measurement.id) });
        }),
    }),
    defineRoute({
      method: 'post',
      path: paths.eyeSettlements(':patientId', SIDE),
      access: 'flag.settle',
      summary: 'Settle a flag by name and reason',
      params,
      body: settlementInputSchema,
      reply: flagSchema,
      handle: ({ params: address, body, write }) =>
        write(async (act) => {
          const flag = await settleFlag(act, address, body);
          return created(flag, { location: paths.eye(address.patientId, address.side) });
        }),
    }),
  ];
}
