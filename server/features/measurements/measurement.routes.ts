import { z } from 'zod';
import { idSchema, measurementSchema, paths } from '@/shared/contract';
import { recordAudit } from '@/server/audit/writer';
import { findEyeById } from '@/server/features/eyes/eye-record.service';
import { ProblemError } from '@/server/http/problem';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { findMeasurement } from './measurement.service';

export function measurementRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.measurement(':id'),
      access: 'patient.read',
      summary: 'One measurement with where it came from',
      params: z.object({ id: idSchema }),
      reply: measurementSchema,
      handle: ({ params, write }) =>
        write(async (act) => {
          const findEye = (eyeId: string) => findEyeById(eyeId, act.transaction);
          const measurement = await findMeasurement(params.id, findEye, act.transaction);
          if (!measurement) throw new ProblemError('not-found');
          await recordAudit(act, {
            action: 'measurement.view',
            noun: 'measurement',
            nounId: measurement.id,
            patientId: measurement.patientId,
          });
          return json(measurement);
        }),
    }),
  ];
}
