/** The measurement of record with its values, and the earlier ones. */
import { View } from 'react-native';
import { METHOD_NAMES } from '@/shared/contract';
import type { EyeDesk, Measurement } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { RowLink } from '@/shared/client/components/row-link';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { measurementFacts, originWords } from '@/shared/client/lib/measurement-facts';
import { formatDate } from '@/shared/client/lib/format';

export function EyeMeasurements({ desk }: { desk: EyeDesk }) {
  const current = desk.measurements.find((measurement) => measurement.isOfRecord);
  const others = desk.measurements.filter((measurement) => !measurement.isOfRecord);
  return (
    <>
      <Card title="Measurement of record">
        {current ? (
          <>
            <Facts items={measurementFacts(current.values)} />
            <Text variant="small" color="ink2">
              {originWords(current)}
            </Text>
            <Link
              href={{ pathname: '/measurements/[measurementId]', params: { measurementId: current.id } }}
              label="Where each value came from"
            />
          </>
        ) : (
          <Text color="ink2">This eye has not been measured. Import a file or enter the values by hand.</Text>
        )}
      </Card>
      {others.length > 0 ? (
        <Card title="Earlier measurements">
          <View role="list">
            {others.map((measurement, index) => (
              <RowLink
                key={measurement.id}
                href={{
                  pathname: '/measurements/[measurementId]',
                  params: { measurementId: measurement.id },
                }}
                title={`${formatDate(measurement.values.measuredAt)}, ${METHOD_NAMES[measurement.values.method]}`}
                detail={supersededWords(measurement)}
                hasRule={index > 0}
              />
            ))}
          </View>
        </Card>
      ) : null}
    </>
  );
}

function supersededWords({ supersededById, supersededReason }: Measurement): string {
  return supersededById
    ? `Superseded: ${supersededReason ?? 'no reason given'}`
    : 'Older than the one of record';
}
