/**
 * The method page: every formula, statistic and check with its equations, sources, how far each was verified,
 * where it holds and what is not known. Made from the same data as the code, so that the two cannot drift.
 */
import type { ReactNode } from 'react';
import {
  formulaFacts,
  formulaIds,
  methodMarkMeanings,
  personalisationFacts,
  solverFacts,
  statisticsFacts,
} from '@/formulas';
import { CHECK_RULES } from '@/shared/clinical/measurement-checks';
import { Card } from '@/shared/client/components/card';
import { Screen } from '@/shared/client/components/screen';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { MethodCard } from './method-card';

const STATISTICS = [...statisticsFacts, ...personalisationFacts, ...solverFacts];

export function MethodScreen() {
  return (
    <Screen
      title="Methods"
      back="/about"
      lead="Every formula and rule, where it comes from, and how far it has been checked"
      width="reading"
    >
      <Card title="What the marks mean">
        <Facts
          items={Object.entries(methodMarkMeanings).map(([mark, meaning]) => ({
            label: `[${mark}]`,
            value: meaning,
          }))}
        />
      </Card>
      <Section title="Formulas">
        {formulaIds.map((id) => {
          const facts = formulaFacts[id];
          return (
            <MethodCard
              key={id}
              facts={{ ...facts, name: `${facts.name} (${facts.year})`, checks: FORMULA_CHECKS }}
              caution={facts.caution}
            />
          );
        })}
      </Section>
      <Section title="Checks of a measurement">
        <Card label="Checks of a measurement">
          <Facts
            items={CHECK_RULES.map((rule) => ({
              label: rule.id.replaceAll('-', ' '),
              value: `${rule.source} [${rule.mark}]`,
            }))}
          />
        </Card>
      </Section>
      <Section title="Statistics and personal constants">
        {STATISTICS.map((facts) => (
          <MethodCard key={facts.id} facts={facts} caution={null} />
        ))}
      </Section>
    </Screen>
  );
}

const FORMULA_CHECKS = [
  'an independent implementation of the same equations in another language (not a published standard), to 0.000001 D',
  'ray matrices of the optics, to 0.000000001 D',
  'published single numbers where one could be read',
];

function Section({ title, children }: { title: string; children: ReactNode }) {
  return (
    <>
      <Text variant="title" level={2}>
        {title}
      </Text>
      {children}
    </>
  );
}
