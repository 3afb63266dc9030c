import type { WindowCell } from "../core.ts";
import type { LinearScale } from "../format/linear-scale.ts";
import type { PaceAnswer } from "../worker/protocol.ts";

interface PaceMarksProps {
  readonly answer: PaceAnswer;
  readonly measure: "use" | "time";
  readonly x: LinearScale;
  readonly y: LinearScale;
  readonly bottom: number;
  /** px of the plot's left end. */
  readonly start: number;
  readonly pointed: number | null;
}

/** What may be spent with the reserve kept, the plan's own speed, the speeds to choose, and the speed that is pointed at. */
export function PaceMarks({ answer, measure, x, y, bottom, start, pointed }: PaceMarksProps) {
  const { curve, least, fastest, speed_m_s } = answer;
  const level = measure === "use" ? spendable(curve.points, curve.usable) : null;
  return (
    <g>
      {level !== null && (
        <>
          <path
            class="reserve"
            d={level.map((at, i) => `${i === 0 ? "M" : "L"}${x(at.speed)} ${y(at.amount)}`).join("")}
          />
          {/* At the slow end, where the curve is below. */}
          <text class="reserve-name" x={start + 14} y={y(level[0]?.amount ?? 0) - 4}>
            reserve kept below
          </text>
        </>
      )}
      {speed_m_s !== null && <path class="own" d={`M${x(speed_m_s)} ${bottom}V30`} />}
      {pointed !== null && <path class="pointed" d={`M${x(pointed)} ${bottom}V30`} />}
      <Letter letter="U" cell={least} x={x} bottom={bottom} />
      <Letter letter="F" cell={fastest} x={x} bottom={bottom} />
    </g>
  );
}

/** What may be spent at each speed: a reserve of a time differs with the speed. */
function spendable(
  points: readonly WindowCell[],
  usable: number,
): { speed: number; amount: number }[] | null {
  const known = points.flatMap(({ speed_m_s, reserve }) =>
    speed_m_s === null || reserve === null ? [] : [{ speed: speed_m_s, amount: usable - reserve }],
  );
  return known.length < 2 ? null : known;
}

function Letter({
  letter,
  cell,
  x,
  bottom,
}: {
  letter: string;
  cell: WindowCell | null;
  x: LinearScale;
  bottom: number;
}) {
  if (cell === null || cell.speed_m_s === null) return null;
  return (
    <g class="mark" transform={`translate(${x(cell.speed_m_s)} 0)`}>
      <path d={`M0 ${bottom}V30`} />
      <rect x="-7" y="15" width="14" height="15" rx="2" />
      <text y="26.5">{letter}</text>
    </g>
  );
}
