const FACES = [
  '400 12px "Fira Sans"',
  '500 12px "Fira Sans"',
  '600 12px "Fira Sans"',
  '400 12px "Fira Sans Signs"',
  '600 12px "Fira Sans Signs"',
  '400 12px "Fira Mono"',
];

/** A canvas draws with what is loaded at that moment, so the faces are fetched before the first drawing. */
export async function loadChartFonts(): Promise<void> {
  await Promise.allSettled(FACES.map((face) => document.fonts.load(face, 'A −≤')));
}
