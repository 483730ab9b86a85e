import styles from './axes.module.css';
import type { Scale } from './curve-path';
import type { Domain } from './domain';
import { axisPower, niceTicks, superscript, tickText } from './ticks';

export interface Frame {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

interface AxisProps {
  readonly frame: Frame;
  readonly domain: Domain;
  readonly scale: Scale;
  readonly name: string;
}

const PIXELS_A_TICK = { across: 80, up: 46 } as const;

/** The horizontal axis: a line, ticks under it, its name at its end. */
export function HorizontalAxis({ frame, domain, scale, name }: AxisProps) {
  const power = axisPower(domain.from, domain.to);
  const { ticks, step } = niceTicks(domain.from, domain.to, (frame.right - frame.left) / PIXELS_A_TICK.across);
  return (
    <g className={styles.axis}>
      <line className={styles.line} x1={frame.left} x2={frame.right} y1={frame.bottom} y2={frame.bottom} />
      {ticks.map((tick) => (
        <g key={tick}>
          <line className={styles.line} x1={scale(tick)} x2={scale(tick)} y1={frame.bottom} y2={frame.bottom + 4} />
          <text className={styles.number} x={scale(tick)} y={frame.bottom + 18} textAnchor="middle">
            {tickText(tick / 10 ** power, step / 10 ** power)}
          </text>
        </g>
      ))}
      <text className={styles.name} x={frame.right} y={frame.bottom + 36} textAnchor="end">
        {name}
        {power === 0 ? '' : ` / 10${superscript(power)}`}
      </text>
    </g>
  );
}

/** The vertical axis: faint rules across the frame, numbers at its left, a common power of ten above. */
export function VerticalAxis({ frame, domain, scale, name, rules }: AxisProps & { readonly rules: boolean }) {
  const power = axisPower(domain.from, domain.to);
  const { ticks, step } = niceTicks(domain.from, domain.to, (frame.bottom - frame.top) / PIXELS_A_TICK.up);
  return (
    <g className={styles.axis}>
      {ticks.map((tick) => (
        <g key={tick}>
          {rules ? (
            <line className={styles.rule} x1={frame.left} x2={frame.right} y1={scale(tick)} y2={scale(tick)} />
          ) : null}
          <line className={styles.line} x1={frame.left - 4} x2={frame.left} y1={scale(tick)} y2={scale(tick)} />
          <text className={styles.number} x={frame.left - 8} y={scale(tick) + 4} textAnchor="end">
            {tickText(tick / 10 ** power, step / 10 ** power)}
          </text>
        </g>
      ))}
      {power === 0 ? null : (
        <text className={styles.number} x={frame.left} y={frame.top - 8} textAnchor="start">
          × 10{superscript(power)}
        </text>
      )}
      {name ? (
        <text className={styles.name} x={frame.left - 8} y={frame.top - 8} textAnchor="end">
          {name}
        </text>
      ) : null}
    </g>
  );
}
