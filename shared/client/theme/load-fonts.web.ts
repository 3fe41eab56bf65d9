/**
 * Loads the fonts through the browser's font interface. The usual way writes a style element into the page,
 * which the content security policy rightly refuses.
 */
import { Asset } from 'expo-asset';
import { FONT_FILES } from './font-files';

export async function loadFonts(): Promise<void> {
  if (typeof FontFace === 'undefined') return;
  const faces = Object.entries(FONT_FILES).map(
    ([family, file]) => new FontFace(family, `url("${Asset.fromModule(file).uri}")`),
  );
  for (const face of faces) document.fonts.add(await face.load());
}
