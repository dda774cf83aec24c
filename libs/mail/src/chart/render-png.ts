import { createRequire } from 'node:module';
import { Resvg } from '@resvg/resvg-js';

const FONTS = ['400Regular/NotoSans_400Regular.ttf', '600SemiBold/NotoSans_600SemiBold.ttf'];

/** Twice the size at which it is shown, for screens with fine pixels. */
const ZOOM = 2;

/** A drawing as a PNG picture. Its letters come with Ebbline: a machine without any font draws them too. */
export function renderPng(svg: string): Buffer {
  const packages = createRequire(__filename);
  const fontFiles = FONTS.map((file) => packages.resolve(`@expo-google-fonts/noto-sans/${file}`));
  const drawing = new Resvg(svg, {
    fitTo: { mode: 'zoom', value: ZOOM },
    font: { fontFiles, loadSystemFonts: false, defaultFontFamily: 'Noto Sans' },
  });
  return drawing.render().asPng();
}
