/** The fonts of printed sheets: the same faces as on screen, embedded so that a sheet looks alike everywhere. */
import { dirname, join } from 'node:path';

const folderOf = (packageName: string): string => dirname(require.resolve(`${packageName}/package.json`));
const words = folderOf('@expo-google-fonts/atkinson-hyperlegible');
const numbers = folderOf('@expo-google-fonts/roboto-mono');

export const SHEET_FONTS = {
  words: join(words, '400Regular', 'AtkinsonHyperlegible_400Regular.ttf'),
  wordsBold: join(words, '700Bold', 'AtkinsonHyperlegible_700Bold.ttf'),
  numbers: join(numbers, '400Regular', 'RobotoMono_400Regular.ttf'),
  numbersBold: join(numbers, '600SemiBold', 'RobotoMono_600SemiBold.ttf'),
} as const;
export type SheetFont = keyof typeof SHEET_FONTS;
