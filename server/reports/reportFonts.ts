import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { fontCoverage } from './fontCoverage.ts'

const require = createRequire(import.meta.url)

function notoSans(style: string): string {
  return require.resolve(`@expo-google-fonts/noto-sans/${style}/NotoSans_${style}.ttf`)
}

function dejaVu(name: string): string {
  return require.resolve(`dejavu-fonts-ttf/ttf/${name}.ttf`)
}

/** Whole TrueType files: the ones made for browsers are compressed and cut into ranges. */
export const REPORT_FONTS = {
  'Noto Sans': {
    normal: notoSans('400Regular'),
    bold: notoSans('600SemiBold'),
    italics: notoSans('400Regular_Italic'),
    bolditalics: notoSans('600SemiBold_Italic'),
  },
  'DejaVu Sans': {
    normal: dejaVu('DejaVuSans'),
    bold: dejaVu('DejaVuSans-Bold'),
    italics: dejaVu('DejaVuSans-Oblique'),
    bolditalics: dejaVu('DejaVuSans-BoldOblique'),
  },
  'DejaVu Sans Mono': {
    normal: dejaVu('DejaVuSansMono'),
    bold: dejaVu('DejaVuSansMono-Bold'),
    italics: dejaVu('DejaVuSansMono-Oblique'),
    bolditalics: dejaVu('DejaVuSansMono-BoldOblique'),
  },
}

export type ReportFont = keyof typeof REPORT_FONTS

/** In the order in which a sign is looked for. */
const FALLBACK: { font: ReportFont; covers: (codePoint: number) => boolean }[] = [
  {
    font: 'Noto Sans',
    covers: fontCoverage(readFileSync(REPORT_FONTS['Noto Sans'].normal)),
  },
  {
    font: 'DejaVu Sans',
    covers: fontCoverage(readFileSync(REPORT_FONTS['DejaVu Sans'].normal)),
  },
]

/** The font that has a sign, or null where none has. */
export function fontFor(codePoint: number): ReportFont | null {
  return FALLBACK.find(({ covers }) => covers(codePoint))?.font ?? null
}
