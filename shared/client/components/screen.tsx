/**
 * The frame of every screen: title of the window, one h1 that takes the focus when the screen is reached,
 * a way back, the width of a page, and the standing cautions at its foot.
 */
import type { ReactNode } from 'react';
import { ScrollView, View } from 'react-native';
import Head from 'expo-router/head';
import { router } from 'expo-router';
import type { Href } from 'expo-router';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Button } from './button';
import { Text } from './text';
import { useHeadingFocus } from './use-heading-focus';

interface ScreenProps {
  title: string;
  /** Shown instead of `title` in the heading when it needs more than words. */
  lead?: string;
  /** Where "Back" goes when there is no earlier page in this window. */
  back?: Href;
  /** Right of the heading: the screen's main action. */
  action?: ReactNode;
  /** Above everything, sticky: whose eye this is. */
  strip?: ReactNode;
  /** Below everything, sticky at thumb height on a phone. */
  footer?: ReactNode;
  width?: 'reading' | 'page' | 'full';
  hasCautions?: boolean;
  children: ReactNode;
}

const WIDTHS = { reading: 720, page: 1120, full: 1600 } as const;

export function Screen({
  title,
  lead,
  back,
  action,
  strip,
  footer,
  width = 'page',
  hasCautions = true,
  children,
}: ScreenProps) {
  const { colors } = useTheme();
  const { isPhone } = useLayout();
  const heading = useHeadingFocus();
  const page = {
    width: '100%',
    maxWidth: WIDTHS[width],
    alignSelf: 'center',
    paddingHorizontal: isPhone ? SPACE.l : SPACE.xl,
  } as const;
  return (
    <View style={{ flex: 1, backgroundColor: colors.paper }}>
      <Head>
        <title>{`${title} · Landfall`}</title>
      </Head>
      {strip}
      <ScrollView
        style={{ flex: 1 }}
        contentContainerStyle={{ paddingVertical: isPhone ? SPACE.l : SPACE.xl, flexGrow: 1 }}
        tabIndex={-1}
      >
        <View style={[page, { gap: SPACE.l, flexGrow: 1 }]}>
          {back ? (
            <View style={{ marginLeft: -SPACE.s }}>
              <Button
                label="Back"
                kind="plain"
                onPress={() => (router.canGoBack() ? router.back() : router.replace(back))}
              />
            </View>
          ) : null}
          <View
            style={{
              flexDirection: 'row',
              flexWrap: 'wrap',
              gap: SPACE.m,
              justifyContent: 'space-between',
              alignItems: 'center',
            }}
          >
            <View style={{ flexShrink: 1, gap: SPACE.xs }}>
              <Text variant="display" level={1} ref={heading} isFocusable>
                {title}
              </Text>
              {lead ? <Text color="ink2">{lead}</Text> : null}
            </View>
            {action}
          </View>
          {children}
          {hasCautions ? <Cautions /> : null}
        </View>
      </ScrollView>
      {footer ? (
        <View
          style={{
            backgroundColor: colors.surface,
            borderTopWidth: 1,
            borderTopColor: colors.line,
            paddingVertical: SPACE.s,
          }}
        >
          <View style={page}>{footer}</View>
        </View>
      ) : null}
    </View>
  );
}

function Cautions() {
  const { colors } = useTheme();
  return (
    <View style={{ marginTop: 'auto', paddingTop: SPACE.xl }}>
      <View style={{ borderTopWidth: 1, borderTopColor: colors.hairline, paddingTop: SPACE.s }}>
        <Text variant="small" color="ink2">
          Decision support for trained clinicians. It does not replace judgement, the device&rsquo;s own
          printout, local codes or licensed practice. Check inputs against their source.
        </Text>
      </View>
    </View>
  );
}
