import { createRequire } from 'node:module';

export interface RasterOptions {
  /** Pixels across; the height follows. */
  readonly width: number;
}

export const RASTER_DEFAULTS: RasterOptions = { width: 1600 };

const require = createRequire(import.meta.url);
/** Loaded when a picture is wanted: most runs draw none. */
let renderer: typeof import('@resvg/resvg-js') | null = null;

const fontFile = (name: string): string => require.resolve(`@expo-google-fonts/arimo/${name}`);

/** A picture (PNG) of an SVG, without a browser. Text is set in a font that comes with the program, so any machine draws the same. */
export function rasterise(svg: string, options: Partial<RasterOptions> = {}): Uint8Array {
  const { width } = { ...RASTER_DEFAULTS, ...options };
  renderer ??= require('@resvg/resvg-js') as typeof import('@resvg/resvg-js');
  const picture = new renderer.Resvg(svg, {
    fitTo: { mode: 'width', value: width },
    font: {
      fontFiles: [fontFile('400Regular/Arimo_400Regular.ttf'), fontFile('700Bold/Arimo_700Bold.ttf')],
      defaultFontFamily: 'Arimo',
      sansSerifFamily: 'Arimo',
      // The font has Latin, Greek, Cyrillic and Hebrew; for other writing the machine is asked.
      loadSystemFonts: hasOtherWriting(svg),
    },
  });
  return picture.render().asPng();
}

const hasOtherWriting = (svg: string): boolean =>
  /[\u0600-\u1cff\u2e80-\ud7ff\uf900-\ufaff\u{10000}-\u{3ffff}]/u.test(svg);
