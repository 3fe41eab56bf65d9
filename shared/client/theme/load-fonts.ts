/** Loads the fonts that ship with the app, where the platform has its own way for that. */
import { loadAsync } from 'expo-font';
import { FONT_FILES } from './font-files';

export const loadFonts = (): Promise<void> => loadAsync(FONT_FILES);
