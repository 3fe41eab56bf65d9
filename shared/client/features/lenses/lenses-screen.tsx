import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import {
  CONSTANT_ORIGINS,
  FORMULA_IDS,
  hasPermission,
  LENS_DESIGN_NAMES,
  LENS_KIND_NAMES,
} from '@/shared/contract';
import type { Lens } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Row } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Link } from '@/shared/client/components/link';
import { Tag } from '@/shared/client/components/mark';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatPower } from '@/shared/client/lib/format';
import { searchFieldRef } from '@/shared/client/lib/search-focus';
import { lensesQuery } from './use-lenses';

const COLUMNS: Column<Lens>[] = [
  { key: 'name', title: 'Model', share: 1.8, render: (lens) => lens.name },
  {
    key: 'kind',
    title: 'Kind',
    share: 1.4,
    render: (lens) => `${LENS_KIND_NAMES[lens.kind]}${lens.isToric ? ', toric' : ''}`,
  },
  { key: 'design', title: 'Design', share: 1.2, render: (lens) => LENS_DESIGN_NAMES[lens.design] },
  { key: 'powers', title: 'Powers (D)', share: 1.4, isNumber: true, render: powersOf },
  { key: 'constants', title: 'Constants', share: 1.6, render: constantsOf },
  { key: 'state', title: '', share: 0.8, render: (lens) => <LensTags lens={lens} /> },
];

export function LensesScreen() {
  const user = useUser();
  const [search, setSearch] = useState('');
  const lenses = useQuery(lensesQuery());
  const canWrite = hasPermission(user.roles, 'lens.write');
  return (
    <Screen
      title="Lenses"
      lead="Models, their powers, and constants per formula with where they come from"
      action={canWrite ? <CatalogueActions /> : undefined}
    >
      <TextField
        label="Find a model"
        type="search"
        value={search}
        onChange={setSearch}
        ref={searchFieldRef}
        isRequired
      />
      <QueryView query={lenses}>
        {({ items }) => <LensList lenses={items} search={search.trim()} />}
      </QueryView>
    </Screen>
  );
}

function CatalogueActions() {
  return (
    <Row>
      <Link href="/lenses/import" label="Import a CSV" kind="button" />
      <Link href="/lenses/new" label="Add a model" kind="primary" />
    </Row>
  );
}

function LensList({ lenses, search }: { lenses: readonly Lens[]; search: string }) {
  const shown = lenses.filter((lens) => lens.name.toLowerCase().includes(search.toLowerCase()));
  if (shown.length === 0 && search)
    return <EmptyState title="No model of this name" hint="Try a part of the name." />;
  if (shown.length === 0) {
    return (
      <EmptyState
        title="The catalogue is empty"
        hint="The administrator adds models by form or CSV; a plan needs at least one with constants."
      />
    );
  }
  return (
    <DataTable
      label="Lens models"
      columns={COLUMNS}
      items={shown}
      keyOf={(lens) => lens.id}
      linkOf={(lens) => ({
        href: { pathname: '/lenses/[lensId]', params: { lensId: lens.id } },
        label: lens.name,
      })}
    />
  );
}

export function LensTags({ lens }: { lens: Lens }) {
  return (
    <Row gap={4}>
      {lens.isDemo ? <Tag label="invented" /> : null}
      {lens.isRetired ? <Tag label="retired" color="stop" /> : null}
    </Row>
  );
}

function powersOf(lens: Lens): string {
  const first = lens.powerRanges[0];
  const last = lens.powerRanges.at(-1);
  return first && last
    ? `${formatPower(first.fromD, first.stepD)} to ${formatPower(last.toD, last.stepD)}`
    : '—';
}

/** `optical 5 of 5, ultrasound 3 of 5` */
function constantsOf(lens: Lens): string {
  const parts = CONSTANT_ORIGINS.map((origin) => {
    const count = lens.constants.filter((constant) => constant.origin === origin).length;
    return count === 0 ? `no ${origin}` : `${origin} ${count} of ${FORMULA_IDS.length}`;
  });
  return parts.join(', ');
}
