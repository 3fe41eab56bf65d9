/**
 * Day or night, and how wide the window is. The choice is kept per browser; "auto" follows the system.
 */
import { createContext, useContext, useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import { useColorScheme, useWindowDimensions } from 'react-native';
import { readStored, writeStored } from '@/shared/client/lib/stored';
import { BREAKPOINT, DAY, FONT, NIGHT } from './tokens';
import type { Colours } from './tokens';

export type ThemeChoice = 'auto' | 'day' | 'night';

interface Theme {
  colors: Colours;
  fonts: { words: string; numbers: string };
  isNight: boolean;
  choice: ThemeChoice;
  setChoice: (choice: ThemeChoice) => void;
}

const STORAGE_KEY = 'landfall.theme';
const fonts = { words: FONT.words, numbers: FONT.numbers };
const ThemeContext = createContext<Theme>({
  colors: DAY,
  fonts,
  isNight: false,
  choice: 'auto',
  setChoice: () => undefined,
});

export function ThemeProvider({ children }: { children: ReactNode }) {
  const system = useColorScheme();
  const [choice, setChoice] = useState<ThemeChoice>(() => storedChoice());
  const isNight = choice === 'night' || (choice === 'auto' && system === 'dark');
  const theme = useMemo<Theme>(
    () => ({
      colors: isNight ? NIGHT : DAY,
      fonts,
      isNight,
      choice,
      setChoice: (next) => {
        writeStored(STORAGE_KEY, next);
        setChoice(next);
      },
    }),
    [isNight, choice],
  );
  return <ThemeContext.Provider value={theme}>{children}</ThemeContext.Provider>;
}

export function useTheme(): Theme {
  return useContext(ThemeContext);
}

export interface Layout {
  widthPx: number;
  isPhone: boolean;
  isWide: boolean;
}

export function useLayout(): Layout {
  const { width } = useWindowDimensions();
  return { widthPx: width, isPhone: width < BREAKPOINT.tablet, isWide: width >= BREAKPOINT.wide };
}

function storedChoice(): ThemeChoice {
  const stored = readStored(STORAGE_KEY);
  return stored === 'day' || stored === 'night' ? stored : 'auto';
}
