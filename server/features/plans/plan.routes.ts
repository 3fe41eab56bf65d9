import { z } from 'zod';
import {
  idSchema,
  newPlanSchema,
  paths,
  planChangeSchema,
  planDeskSchema,
  planListQuerySchema,
  planPageSchema,
  sideSchema,
  signPlanSchema,
  type PlanDesk,
  type Side,
} from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { verifyPassword } from '@/server/features/auth/verify-password.service';
import { created, file, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { planSheet } from '@/server/reports/plan-sheet';
import { listPlans } from './plan-list.service';
import { changePlan, discardPlan, signPlan, startDraft, viewForPrint, viewPlan } from './plan.service';

const byId = z.object({ id: idSchema });
const byEye = z.object({ patientId: idSchema, side: sideSchema });
const SIDE = ':side' as Side;

export function planRoutes(deps: Deps): Route[] {
  return [...readingRoutes(deps), ...draftRoutes(), signRoute(deps)];
}

const versioned = (desk: PlanDesk) => json(desk, { version: desk.plan.version });

function readingRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.plans(),
      access: 'plan.read',
      summary: 'Plans, newest act first, the choice in plain words',
      query: planListQuerySchema,
      reply: planPageSchema,
      handle: async ({ query, actor }) => json(await listPlans(actor, deps.clock.now().toISOString(), query)),
    }),
    defineRoute({
      method: 'get',
      path: paths.plan(':id'),
      access: 'plan.read',
      summary: 'A plan with its calculation; a signed one as it was frozen',
      params: byId,
      reply: planDeskSchema,
      handle: async ({ params: { id }, actor, requestId }) =>
        versioned(await viewPlan(deps, { actor, requestId }, id)),
    }),
    defineRoute({
      method: 'get',
      path: paths.planSheet(':id'),
      access: 'plan.read',
      summary: 'The sheet of a signed plan, for print',
      params: byId,
      query: z.object({ paper: z.enum(['a4', 'letter']).optional() }),
      reply: 'application/pdf',
      handle: async ({ params: { id }, query, actor, requestId }) => {
        const printed = await viewForPrint(deps, { actor, requestId }, id);
        const { patient, sequence } = printed.snapshot;
        const fileName = `plan-${patient.recordNumber}-${printed.plan.side}-${sequence}.pdf`;
        return file({
          bytes: await planSheet({ ...printed, paper: query.paper ?? 'a4' }),
          contentType: 'application/pdf',
          fileName,
        });
      },
    }),
  ];
}

function draftRoutes(): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: paths.eyePlans(':patientId', SIDE),
      access: 'plan.write',
      summary: 'A new draft for this eye, or the one that is open',
      params: byEye,
      body: newPlanSchema,
      reply: planDeskSchema,
      handle: ({ params, body, write }) =>
        write(async (act) => {
          const desk = await startDraft(act, params, body);
          return created(desk, { location: paths.plan(desk.plan.id), version: desk.plan.version });
        }),
    }),
    defineRoute({
      method: 'put',
      path: paths.plan(':id'),
      access: 'plan.write',
      summary: 'Change the decisions or the choice of a draft',
      params: byId,
      body: planChangeSchema,
      reply: planDeskSchema,
      handle: ({ params: { id }, body, ifMatch, write }) =>
        write(async (act) => versioned(await changePlan(act, id, { ifMatch, change: body }))),
    }),
    defineRoute({
      method: 'post',
      path: paths.planDiscard(':id'),
      access: 'plan.write',
      summary: 'Discard a draft; it stays in the audit trail',
      params: byId,
      reply: planDeskSchema,
      handle: ({ params: { id }, write }) => write(async (act) => versioned(await discardPlan(act, id))),
    }),
  ];
}

function signRoute(deps: Deps): Route {
  return defineRoute({
    method: 'post',
    path: paths.planSign(':id'),
    access: 'plan.sign',
    summary: 'Sign a draft with the password again; freezes it',
    params: byId,
    body: signPlanSchema,
    reply: planDeskSchema,
    handle: async ({ params: { id }, body: { password, ...signature }, actor, requestId, write }) => {
      await verifyPassword(deps, { actor, password, requestId });
      return write(async (act) => versioned(await signPlan(act, id, signature)));
    },
  });
}
