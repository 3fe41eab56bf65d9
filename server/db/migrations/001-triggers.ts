/** What the database itself refuses, whoever asks: changes of the audit trail, of measurements, of signatures. */

const MEASUREMENT_COLUMNS = [
  'id',
  'eye_id',
  'measured_at',
  'method',
  'device',
  'axial_length_mm',
  'axial_length_sd_mm',
  'flat_radius_mm',
  'steep_radius_mm',
  'flat_k_d',
  'steep_k_d',
  'keratometric_index',
  'flat_axis_deg',
  'steep_axis_deg',
  'acd_mm',
  'acd_from',
  'lens_thickness_mm',
  'corneal_thickness_um',
  'white_to_white_mm',
  'pupil_mm',
  'operator',
  'remarks',
  'content_hash',
  'import_id',
  'import_row',
  'raw',
  'created_by',
  'created_at',
];

const SIGNED_PLAN_COLUMNS = [
  'id',
  'eye_id',
  'sequence',
  'input',
  'choice',
  'created_by',
  'created_at',
  'signed_by',
  'signed_at',
  'snapshot',
  'digest',
];

const anyChanged = (columns: readonly string[]): string =>
  columns.map((column) => `OLD.${column} IS NOT NEW.${column}`).join(' OR ');

interface Refusal {
  name: string;
  table: string;
  event: 'UPDATE' | 'DELETE';
  /** When to refuse; always, if absent. */
  when?: string;
  message: string;
}

const REFUSALS: readonly Refusal[] = [
  {
    name: 'audit_entries_no_update',
    table: 'audit_entries',
    event: 'UPDATE',
    message: 'the audit trail is never changed',
  },
  {
    name: 'audit_entries_no_delete',
    table: 'audit_entries',
    event: 'DELETE',
    message: 'the audit trail is never deleted',
  },
  {
    name: 'flag_settlements_no_update',
    table: 'flag_settlements',
    event: 'UPDATE',
    message: 'a settlement is never changed',
  },
  {
    name: 'flag_settlements_no_delete',
    table: 'flag_settlements',
    event: 'DELETE',
    message: 'a settlement is never deleted',
  },
  {
    name: 'measurements_no_update',
    table: 'measurements',
    event: 'UPDATE',
    when: `OLD.superseded_by_id IS NOT NULL OR NEW.superseded_by_id IS NULL
      OR NEW.superseded_reason IS NULL OR ${anyChanged(MEASUREMENT_COLUMNS)}`,
    message: 'a measurement is superseded, never changed',
  },
  {
    name: 'measurements_no_delete',
    table: 'measurements',
    event: 'DELETE',
    message: 'a measurement is never deleted',
  },
  {
    name: 'plans_signed_no_update',
    table: 'plans',
    event: 'UPDATE',
    when: `OLD.status IN ('signed', 'replaced') AND (
      NEW.status NOT IN ('signed', 'replaced') OR (OLD.status = 'replaced' AND NEW.status = 'signed')
      OR (OLD.replaced_by_id IS NOT NULL AND OLD.replaced_by_id IS NOT NEW.replaced_by_id)
      OR ${anyChanged(SIGNED_PLAN_COLUMNS)})`,
    message: 'a signed plan is replaced, never changed',
  },
  {
    name: 'plans_signed_no_delete',
    table: 'plans',
    event: 'DELETE',
    when: `OLD.status IN ('signed', 'replaced')`,
    message: 'a signed plan is never deleted',
  },
];

export const TRIGGERS = REFUSALS.map(({ name, table, event, when, message }) => ({
  name,
  sql: `CREATE TRIGGER ${name} BEFORE ${event} ON ${table} ${when ? `WHEN ${when}` : ''}
    BEGIN SELECT RAISE(ABORT, '${message}'); END`,
}));
