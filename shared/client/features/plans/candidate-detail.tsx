/** The chosen power opened: every formula's prediction, lens position and constants, and where the spread comes from. */
import { View } from 'react-native';
import { FORMULA_NAMES } from '@/shared/contract';
import type { Candidate, ModelCalculation, Prediction } from '@/shared/contract';
import { formulaFacts } from '@/formulas';
import { Link } from '@/shared/client/components/link';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import {
  formatDate,
  formatDecimals,
  formatDioptres,
  formatMm,
  formatPower,
} from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';

interface CandidateDetailProps {
  model: ModelCalculation;
  candidate: Candidate;
  stepD: number;
}

export function CandidateDetail({ model, candidate, stepD }: CandidateDetailProps) {
  return (
    <View style={{ gap: SPACE.m }}>
      <Text variant="heading" level={3}>{`${formatPower(candidate.powerD, stepD)} D by every formula`}</Text>
      <DataTable
        label="Predictions by formula"
        columns={columnsFor(model)}
        items={candidate.predictions}
        keyOf={(p) => p.formula}
      />
      <Text variant="small" color="ink2">
        {`Spread ±${formatDecimals(candidate.landing.sdD, 2)} D (one standard deviation), from: ${model.spreadParts
          .map((part) => `${part.source} ${formatDecimals(part.sdD, 2)}`)
          .join('; ')}.`}
      </Text>
      <Link href="/method" label="How each formula works and how far it was checked" />
      {candidate.predictions.map((prediction) => (
        <FormulaCautions key={prediction.formula} prediction={prediction} />
      ))}
    </View>
  );
}

function columnsFor(model: ModelCalculation): Column<Prediction>[] {
  const constantOf = (prediction: Prediction) =>
    model.constants.find((constant) => constant.formula === prediction.formula);
  return [
    {
      key: 'formula',
      title: 'Formula',
      render: (p) => `${FORMULA_NAMES[p.formula]}${p.formula === model.leadingFormula ? ' (leads)' : ''}`,
    },
    {
      key: 'refraction',
      title: 'Predicted (D)',
      isNumber: true,
      render: (p) => formatDioptres(p.refractionD),
    },
    { key: 'elp', title: 'Lens position (mm)', isNumber: true, render: (p) => formatMm(p.elpMm) },
    {
      key: 'constants',
      title: 'Constants',
      isNumber: true,
      render: (p) =>
        Object.values(constantOf(p)?.values ?? {})
          .map(String)
          .join(' / ') || '—',
    },
    {
      key: 'whose',
      title: 'Whose',
      share: 1.8,
      render: (p) => {
        const constant = constantOf(p);
        return constant ? `${constant.source}, ${constant.origin}, ${formatDate(constant.dated)}` : '—';
      },
    },
  ];
}

function FormulaCautions({ prediction }: { prediction: Prediction }) {
  const caution = formulaFacts[prediction.formula].caution;
  const words = [...(caution ? [caution] : []), ...prediction.notices.map((notice) => notice.message)];
  if (words.length === 0) return null;
  return (
    <Text variant="small" color="ink2">{`${FORMULA_NAMES[prediction.formula]}: ${words.join(' ')}`}</Text>
  );
}
