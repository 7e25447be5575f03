import { join } from 'node:path';
import { Font } from '@react-pdf/renderer';

/** Ink, secondary ink and hairline on paper. */
export const INK = '#221d17';
export const MUTE = '#6a6055';
export const LINE = '#d9cfb9';

let registered = false;

/** The faces of every PDF. */
export function registerFonts(): void {
  if (registered) return;
  registered = true;
  const FONTS = join(process.cwd(), 'public', 'fonts');
  // Static weights (a variable file comes out in its default weight) as WOFF (glyphs of a WOFF2 file cannot be subset).
  Font.register({
    family: 'Public Sans',
    fonts: [
      { src: join(FONTS, 'public-sans-latin-400-normal.woff'), fontWeight: 400 },
      { src: join(FONTS, 'public-sans-latin-600-normal.woff'), fontWeight: 600 },
      { src: join(FONTS, 'public-sans-latin-700-normal.woff'), fontWeight: 700 },
    ],
  });
  Font.register({ family: 'Bricolage', src: join(FONTS, 'bricolage-grotesque-latin-700-normal.woff'), fontWeight: 700 });
  // A variety's code or a lot's number must never be broken.
  Font.registerHyphenationCallback((word) => [word]);
}
