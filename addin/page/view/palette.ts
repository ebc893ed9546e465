/**
 * The project's colours on the grid's canvas. The grid library paints headings and
 * selection in colours of its own, fixed in its code; here its brush is given ours.
 */

const PALETTE: Readonly<Record<string, string>> = {
  // headings: at rest, beside the selection, whole row or column selected, their text
  '#f8f9fa': '#f3efe6',
  '#e8eaed': '#d5e2d8',
  '#595959': '#1f4d3a',
  '#666666': '#4a5046',
  // selection: its frame, the active cell's ground, the ground of the others
  '#3266ca': '#1f4d3a',
  '#f3f7fe': '#f2f7f3',
  '#e9f0ff': '#e4efe7',
  // the frame of a spill
  '#17a2b8': '#5b8f75',
};

/** Makes every colour that is set on this canvas pass through the palette. */
export function paintWithPalette(canvas: HTMLCanvasElement): void {
  const context = canvas.getContext('2d');
  if (context === null) return;
  for (const brush of ['fillStyle', 'strokeStyle'] as const) {
    const own = Object.getOwnPropertyDescriptor(CanvasRenderingContext2D.prototype, brush);
    Object.defineProperty(context, brush, {
      get: () => own?.get?.call(context) as unknown,
      set: (color: unknown) => {
        const ours = typeof color === 'string' ? PALETTE[color.toLowerCase()] : undefined;
        own?.set?.call(context, ours ?? color);
      },
    });
  }
}
