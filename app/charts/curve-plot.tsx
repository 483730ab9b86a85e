import { memo, type RefObject, useId, useMemo, useRef } from 'react';
import type { PlotMark, PlotResult, PlotSeries } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import { type Frame, HorizontalAxis, VerticalAxis } from './axes';
import { curvePath, linearScale, type Scale } from './curve-path';
import styles from './curve-plot.module.css';
import { CurveReadout } from './curve-readout';
import { type Domain, union, verticalDomain } from './domain';
import { Legend } from './legend';
import { asymptoteColour, lineStyle } from './line-styles';
import { markWord, markWords } from './mark-words';
import { symbolText } from './symbol-text';
import { useWidth } from './use-width';

interface CurvePlotProps {
  readonly result: PlotResult;
  /** While a slider is held the vertical axis only grows, so that the curve moves and not the frame. */
  readonly held: boolean;
  readonly svg: RefObject<SVGSVGElement | null>;
}

function frameOf(width: number): Frame {
  const height = Math.max(200, Math.min(340, width * 0.52));
  return { left: 52, right: Math.max(120, width - 14), top: 24, bottom: height };
}

/** Curves drawn by the page itself, at once and at the speed of a slider. */
export const CurvePlot = memo(function CurvePlot({ result, held, svg }: CurvePlotProps) {
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, 620);
  const clip = useId();
  const frame = frameOf(width);
  const domain = useHeldDomain(result, held);
  const [axis] = result.axes;
  const from = axis?.from ?? 0;
  const to = axis?.to ?? 1;
  const x = useMemo(() => linearScale(from, to, frame.left, frame.right), [from, to, frame.left, frame.right]);
  const y = linearScale(domain.from, domain.to, frame.bottom, frame.top);
  const name = symbolText(axis?.name ?? '');
  return (
    <div>
      <div ref={box} className={styles.box} data-own-pointer="">
        <svg
          ref={svg}
          className={styles.plot}
          width={width}
          height={frame.bottom + 44}
          viewBox={`0 0 ${width} ${frame.bottom + 44}`}
          role="img"
          aria-label={`Curves of ${result.series.map((series) => series.name).join(', ')} against ${name}`}
        >
          <clipPath id={clip}>
            <rect
              x={frame.left}
              y={frame.top - 2}
              width={frame.right - frame.left}
              height={frame.bottom - frame.top + 4}
            />
          </clipPath>
          <VerticalAxis frame={frame} domain={domain} scale={y} name="" rules />
          <HorizontalAxis frame={frame} domain={{ from, to }} scale={x} name={name} />
          <g clipPath={`url(#${clip})`}>
            {domain.from < 0 && domain.to > 0 ? (
              <line className={styles.zeroLine} x1={frame.left} x2={frame.right} y1={y(0)} y2={y(0)} />
            ) : null}
            {result.marks.map((mark) =>
              mark.kind === 'pole' ? (
                <line
                  key={`pole ${mark.series} ${mark.x}`}
                  className={styles.pole}
                  x1={x(mark.x)}
                  x2={x(mark.x)}
                  y1={frame.top}
                  y2={frame.bottom}
                />
              ) : null,
            )}
            {numbered(result.asymptotes, nameOf).map(({ key, item: series, at }) => (
              <path
                key={key}
                className={styles.asymptote}
                style={{ stroke: asymptoteColour(result, at) }}
                d={curvePath(series, [], x, y)}
              />
            ))}
            {numbered(result.series, nameOf).map(({ key, item: series, at }) => (
              <path
                key={key}
                className={styles.curve}
                style={{ stroke: lineStyle(at).colour, strokeDasharray: lineStyle(at).dash }}
                d={curvePath(series, polesOf(result.marks, at), x, y)}
              />
            ))}
          </g>
          <Marks marks={result.marks} x={x} y={y} frame={frame} domain={domain} />
        </svg>
        <CurveReadout result={result} frame={frame} x={x} y={y} domain={domain} />
      </div>
      <Legend result={result} />
    </div>
  );
});

const nameOf = ({ name }: PlotSeries) => name;

function polesOf(marks: readonly PlotMark[], series: number): readonly PlotMark[] {
  return marks.filter((mark) => mark.kind === 'pole' && mark.series === series);
}

function useHeldDomain(result: PlotResult, held: boolean): Domain {
  const kept = useRef<Domain | null>(null);
  return useMemo(() => {
    const fresh = verticalDomain(result);
    const shown = held && kept.current ? union(kept.current, fresh) : fresh;
    kept.current = shown;
    return shown;
  }, [result, held]);
}

interface MarksProps {
  readonly marks: readonly PlotMark[];
  readonly x: Scale;
  readonly y: Scale;
  readonly frame: Frame;
  readonly domain: Domain;
}

/** Zeros as rings on the axis, poles as crosses above their line; both with their word. */
function Marks({ marks, x, y, frame, domain }: MarksProps) {
  const zeroAt = domain.from <= 0 && domain.to >= 0 ? y(0) : frame.bottom;
  const words = markWords(marks, x);
  return marks.map((mark, index) => {
    const at = x(mark.x);
    const word = words[index];
    const style = { stroke: lineStyle(mark.series).colour };
    return (
      <g key={`${mark.kind} ${mark.series} ${mark.x}`} className={styles.mark}>
        <title>
          {markWord(mark)} at {mark.x}
        </title>
        {mark.kind === 'zero' ? (
          <>
            <circle cx={at} cy={zeroAt} r={4.5} style={style} />
            <text x={at + 7} y={zeroAt - 7}>
              {word}
            </text>
          </>
        ) : (
          <>
            <path d={`M${at - 4} ${frame.top - 12}l8 8m0 -8l-8 8`} style={style} />
            <text x={at + 8} y={frame.top - 4}>
              {word}
            </text>
          </>
        )}
      </g>
    );
  });
}
