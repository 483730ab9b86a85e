import { type KeyboardEvent, type PointerEvent, useState } from 'react';
import type { PlotResult } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import type { Frame } from './axes';
import type { Scale } from './curve-path';
import type { Domain } from './domain';
import { lineStyle } from './line-styles';
import styles from './readout.module.css';
import { symbolText } from './symbol-text';
import { readoutText } from './ticks';

interface CurveReadoutProps {
  readonly result: PlotResult;
  readonly frame: Frame;
  readonly x: Scale;
  readonly y: Scale;
  readonly domain: Domain;
}

/** A hair line that reads the curves: it follows the pointer, and under the keyboard it is a slider. */
export function CurveReadout({ result, frame, x, y, domain }: CurveReadoutProps) {
  const [at, setAt] = useState<number | null>(null);
  const points = result.series[0]?.x ?? [];
  const last = points.length - 1;
  if (last < 0) return null;
  const index = at === null ? null : Math.min(at, last);
  const place = index === null ? undefined : points[index];
  const name = symbolText(result.axes[0]?.name ?? '');
  const said =
    index === null || place === undefined
      ? `${name} unread`
      : [
          `${name} = ${readoutText(place)}`,
          ...result.series.map((series) => `${series.name} = ${readoutText(series.y[index] ?? null)}`),
        ].join(', ');

  function follow(event: PointerEvent<HTMLElement>): void {
    const { left, width } = event.currentTarget.getBoundingClientRect();
    const part = (event.clientX - left) / width;
    setAt(Math.max(0, Math.min(last, Math.round(part * last))));
  }

  function step(event: KeyboardEvent): void {
    const middle = Math.round(last / 2);
    const big = Math.max(1, Math.round(last / 20));
    const moves: Readonly<Record<string, number>> = {
      ArrowRight: (index ?? middle) + (event.shiftKey ? big : 1),
      ArrowLeft: (index ?? middle) - (event.shiftKey ? big : 1),
      PageUp: (index ?? middle) + big,
      PageDown: (index ?? middle) - big,
      Home: 0,
      End: last,
    };
    const next = moves[event.key];
    if (next === undefined) return;
    event.preventDefault();
    setAt(Math.max(0, Math.min(last, next)));
  }

  return (
    <>
      <div
        className={styles.field}
        style={{
          left: frame.left,
          top: frame.top,
          width: frame.right - frame.left,
          height: frame.bottom - frame.top,
        }}
        role="slider"
        tabIndex={0}
        aria-label={`Read the curves along ${name}`}
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={index ?? Math.round(last / 2)}
        aria-valuetext={said}
        onPointerMove={follow}
        onPointerLeave={() => setAt(null)}
        onKeyDown={step}
        onBlur={() => setAt(null)}
      />
      {index === null || place === undefined ? null : (
        <div className={styles.read} aria-hidden="true">
          <span className={styles.hair} style={{ left: x(place), top: frame.top, height: frame.bottom - frame.top }} />
          {numbered(result.series, ({ name: curve }) => curve).map(({ key, item: series, at: curve }) => {
            const value = series.y[index];
            if (value === null || value === undefined || value < domain.from || value > domain.to) return null;
            return (
              <span
                key={key}
                className={styles.dot}
                style={{ left: x(place), top: y(value), background: lineStyle(curve).colour }}
              />
            );
          })}
          <span className={styles.says} style={sideOf(x(place), frame)}>
            {said}
          </span>
        </div>
      )}
    </>
  );
}

/** The words stand on the side where there is more room. */
function sideOf(at: number, frame: Frame) {
  return at > (frame.left + frame.right) / 2
    ? { right: `calc(100% - ${at - 8}px)`, top: frame.top }
    : { left: at + 8, top: frame.top };
}
