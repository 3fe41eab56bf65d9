/**
 * One definition of columns, two shapes: a table with roles on a wide screen, a list of label and value on a
 * phone. Nothing scrolls sideways.
 */
import type { ReactNode } from 'react';
import { View } from 'react-native';
import type { Href } from 'expo-router';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SHADOW, SPACE } from '@/shared/client/theme/tokens';
import { Link } from './link';
import { Text } from './text';

export interface Column<T> {
  key: string;
  title: string;
  /** Share of the width on a wide screen; 1 when left out. */
  share?: number;
  isNumber?: boolean;
  render: (item: T) => ReactNode;
}

export interface DataTableProps<T> {
  label: string;
  columns: readonly Column<T>[];
  items: readonly T[];
  keyOf: (item: T) => string;
  /** Makes the first column a link that opens the row. */
  linkOf?: (item: T) => { href: Href; label: string };
  /** Below this width rows turn into cards; the default is the tablet's. */
  isCompact?: boolean;
}

export function DataTable<T>(props: DataTableProps<T>) {
  const { isWide } = useLayout();
  return (props.isCompact ?? !isWide) ? <Cards {...props} /> : <Table {...props} />;
}

function Table<T>({ label, columns, items, keyOf, linkOf }: DataTableProps<T>) {
  const { colors } = useTheme();
  return (
    <View
      role="table"
      aria-label={label}
      style={{ backgroundColor: colors.surface, borderRadius: RADIUS, boxShadow: SHADOW }}
    >
      <View
        role="row"
        style={[
          rowStyle,
          {
            borderBottomWidth: 2,
            borderBottomColor: colors.line,
            position: 'sticky',
            top: 0,
            backgroundColor: colors.surface,
            zIndex: 1,
          } as object,
        ]}
      >
        {columns.map((column) => (
          <View key={column.key} role="columnheader" style={{ flex: column.share ?? 1, minWidth: 0 }}>
            <Text variant="small" color="ink2" align={column.isNumber ? 'right' : 'left'}>
              {column.title}
            </Text>
          </View>
        ))}
      </View>
      {items.map((item, index) => (
        <View
          key={keyOf(item)}
          role="row"
          style={[rowStyle, { borderTopWidth: index === 0 ? 0 : 1, borderTopColor: colors.hairline }]}
        >
          {columns.map((column, position) => (
            <View
              key={column.key}
              role="cell"
              style={{
                flex: column.share ?? 1,
                minWidth: 0,
                alignItems: column.isNumber ? 'flex-end' : 'flex-start',
              }}
            >
              {position === 0 && linkOf ? (
                <Link {...linkOf(item)} kind="row" />
              ) : (
                cell(column.render(item), column.isNumber)
              )}
            </View>
          ))}
        </View>
      ))}
    </View>
  );
}

const rowStyle = {
  flexDirection: 'row',
  gap: SPACE.m,
  paddingHorizontal: SPACE.l,
  paddingVertical: SPACE.m,
  alignItems: 'center',
} as const;

function Cards<T>({ label, columns, items, keyOf, linkOf }: DataTableProps<T>) {
  const { colors } = useTheme();
  return (
    <View role="list" aria-label={label} style={{ gap: SPACE.m }}>
      {items.map((item) => (
        <View
          key={keyOf(item)}
          role="listitem"
          style={{
            backgroundColor: colors.surface,
            borderRadius: RADIUS,
            padding: SPACE.l,
            gap: SPACE.s,
            boxShadow: SHADOW,
          }}
        >
          {columns.map((column, position) =>
            position === 0 ? (
              <View key={column.key}>
                {linkOf ? (
                  <Link {...linkOf(item)} kind="row" />
                ) : (
                  cell(column.render(item), column.isNumber, true)
                )}
              </View>
            ) : (
              <View
                key={column.key}
                style={{ flexDirection: 'row', justifyContent: 'space-between', gap: SPACE.m }}
              >
                <Text variant="small" color="ink2" style={{ flexShrink: 0 }}>
                  {column.title}
                </Text>
                <View style={{ flexShrink: 1, alignItems: 'flex-end' }}>
                  {cell(column.render(item), column.isNumber)}
                </View>
              </View>
            ),
          )}
        </View>
      ))}
    </View>
  );
}

function cell(content: ReactNode, isNumber = false, isStrong = false): ReactNode {
  if (typeof content !== 'string' && typeof content !== 'number') return content;
  return (
    <Text isNumber={isNumber} variant={isStrong ? 'strong' : 'body'}>
      {content}
    </Text>
  );
}

/** Label and value under each other, for the facts of one thing. */
export function Facts({
  items,
}: {
  items: readonly { label: string; value: ReactNode; isNumber?: boolean }[];
}) {
  const { colors } = useTheme();
  return (
    <View role="list">
      {items.map((item, index) => (
        <View
          key={item.label}
          role="listitem"
          style={{
            flexDirection: 'row',
            flexWrap: 'wrap',
            justifyContent: 'space-between',
            gap: SPACE.s,
            paddingVertical: SPACE.s,
            borderTopWidth: index === 0 ? 0 : 1,
            borderTopColor: colors.hairline,
          }}
        >
          <Text color="ink2">{item.label}</Text>
          {cell(item.value, item.isNumber)}
        </View>
      ))}
    </View>
  );
}
