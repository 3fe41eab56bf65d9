/** The template, column by column. */
import { MEASUREMENT_FIELDS, TEMPLATE_COLUMNS } from '@/shared/contract';
import type { TemplateColumn } from '@/shared/contract';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';

interface ColumnFacts {
  name: TemplateColumn;
  meaning: string;
  allowed: string;
  example: string;
}

const WORDS: Partial<Record<TemplateColumn, Omit<ColumnFacts, 'name'>>> = {
  record_number: { meaning: 'Record number of the patient', allowed: 'required', example: 'A-1042' },
  family_name: { meaning: 'Family name', allowed: 'required', example: 'Example' },
  given_name: { meaning: 'Given name', allowed: 'required', example: 'Ada' },
  birth_date: { meaning: 'Birth date', allowed: 'required, YYYY-MM-DD', example: '1951-03-09' },
  sex: { meaning: 'Sex', allowed: 'female, male, other, unknown', example: 'female' },
  side: { meaning: 'Which eye', allowed: 'required: right or left', example: 'right' },
  measured_at: { meaning: 'Day of the measurement', allowed: 'required, YYYY-MM-DD', example: '2026-02-14' },
  method: {
    meaning: 'How the length was measured',
    allowed: 'required: optical, immersion or contact',
    example: 'optical',
  },
  device: { meaning: 'Device', allowed: 'text', example: 'room 2' },
  acd_from: {
    meaning: 'Chamber depth measured from',
    allowed: 'with a depth: epithelium or endothelium',
    example: 'epithelium',
  },
  operator: { meaning: 'Who measured', allowed: 'text', example: 'T. Example' },
  remarks: { meaning: 'Remarks', allowed: 'text', example: '' },
};

const EXAMPLES: Partial<Record<TemplateColumn, string>> = {
  axial_length_mm: '23.45',
  axial_length_sd_mm: '0.02',
  flat_k_d: '43.10',
  flat_axis_deg: '178',
  steep_k_d: '43.95',
  steep_axis_deg: '88',
  keratometric_index: '1.3375',
  flat_radius_mm: '7.83',
  steep_radius_mm: '7.68',
  acd_mm: '3.12',
  lens_thickness_mm: '4.51',
  corneal_thickness_um: '545',
  white_to_white_mm: '11.80',
  pupil_mm: '3.20',
};

const ROWS: ColumnFacts[] = TEMPLATE_COLUMNS.map((name) => {
  const words = WORDS[name];
  return words ? { name, ...words } : numberColumn(name);
});

function numberColumn(name: TemplateColumn): ColumnFacts {
  const field = MEASUREMENT_FIELDS.find(({ column }) => column === name);
  const limits = field ? `${field.min} to ${field.max} ${field.unit}`.trim() : '';
  const allowed = name === 'axial_length_mm' ? `required, ${limits}` : limits;
  return { name, meaning: field?.label ?? '', allowed, example: EXAMPLES[name] ?? '' };
}

const COLUMNS: Column<ColumnFacts>[] = [
  { key: 'name', title: 'Column', share: 1.2, isNumber: false, render: (row) => row.name },
  { key: 'meaning', title: 'Meaning', share: 1.2, render: (row) => row.meaning },
  { key: 'allowed', title: 'Accepted', share: 1.4, render: (row) => row.allowed },
  { key: 'example', title: 'Example', share: 0.8, render: (row) => row.example || '—' },
];

export function TemplateTable() {
  return (
    <DataTable label="Columns of the template" columns={COLUMNS} items={ROWS} keyOf={(row) => row.name} />
  );
}
