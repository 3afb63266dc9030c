/** px that one press of an arrow key moves a place on the chart, and with Shift. */
const KEY_STEP = 10;
const KEY_STEP_FINE = 1;

/** How far an arrow key moves a place, px to the right and down; `null` for any other key. */
export function arrowMove({ key, shiftKey }: KeyboardEvent): [number, number] | null {
  const step = shiftKey ? KEY_STEP_FINE : KEY_STEP;
  const moves: Record<string, [number, number]> = {
    ArrowLeft: [-step, 0],
    ArrowRight: [step, 0],
    ArrowUp: [0, -step],
    ArrowDown: [0, step],
  };
  return moves[key] ?? null;
}
