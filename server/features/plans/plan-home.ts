/** What waits on the home page: drafts to finish, plans that no longer stand, and what was signed. */
import type { Home, Plan, PlanListItem } from '@/shared/contract';
import type { Actor } from '@/server/act';
import { listPlans } from './plan-list.service';
import { countPlans } from './plan.repository';

type Section = Home['sections'][number];

const SHOWN = 5;
/** Newest signed plans that are compared with the present for the home page; the list of plans compares all. */
const COMPARED = 50;

export async function draftsSection(actor: Actor, at: string): Promise<Section> {
  return section(actor, at, {
    id: 'drafts',
    status: 'draft',
    title: 'Drafts to finish',
    emptyHint: 'No draft is open. Open an eye that waits for a plan under Patients.',
  });
}

export async function signedPlansSection(actor: Actor, at: string): Promise<Section> {
  return section(actor, at, {
    id: 'signed-plans',
    status: 'signed',
    title: 'Signed plans',
    emptyHint: 'No plan is signed yet. A surgeon signs on the page of a plan.',
  });
}

export async function outOfDateSection(actor: Actor, at: string): Promise<Section> {
  const { items } = await listPlans(actor, at, { status: 'signed', limit: COMPARED });
  const stale = items.filter(({ outOfDateReasons }) => outOfDateReasons.length > 0);
  return {
    id: 'out-of-date',
    title: 'Signed plans that are out of date',
    emptyHint: 'The newest signed plans stand on what they were signed on.',
    total: stale.length,
    items: stale
      .slice(0, SHOWN)
      .map((plan) => ({ ...toItem(plan), detail: plan.outOfDateReasons.join('. ') })),
  };
}

interface SectionFacts {
  id: string;
  status: Plan['status'];
  title: string;
  emptyHint: string;
}

async function section(actor: Actor, at: string, { status, ...words }: SectionFacts): Promise<Section> {
  const { items } = await listPlans(actor, at, { status, limit: SHOWN });
  return { ...words, total: await countPlans([status]), items: items.map(toItem) };
}

function toItem({ id, patientName, plainWords, side }: PlanListItem): Section['items'][number] {
  return { title: patientName, detail: plainWords, href: `/plans/${id}`, side };
}
