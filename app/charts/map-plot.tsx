import { memo, type RefObject, useEffect, useMemo, useRef } from 'react';
import type { PlotResult } from '../../engine/requests/result';
import { type Frame, HorizontalAxis, VerticalAxis } from './axes';
import { rampColour, rampSteps } from './colour-ramp';
import { linearScale } from './curve-path';
import styles from './map-plot.module.css';
import { MapReadout } from './map-readout';
import { type MapScale, type MapValues, mapScale } from './map-scale';
import { symbolText } from './symbol-text';
import { readoutText } from './ticks';
import { useWidth } from './use-width';

interface MapPlotProps {
  readonly result: PlotResult;
  readonly svg: RefObject<SVGSVGElement | null>;
}

/** A quantity over two ranges, drawn by the page itself; the picture lies inside the drawing, so both export as one. */
export const MapPlot = memo(function MapPlot({ result, svg }: MapPlotProps) {
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, 620);
  const side = Math.max(160, Math.min(width - 74, 420));
  const frame: Frame = { left: 58, right: 58 + side, top: 26, bottom: 26 + side * 0.8 };
  const [across, up] = result.axes;
  const [series] = result.series;
  const values = series?.z;
  const scale = useMemo(() => (values ? mapScale(values) : null), [values]);
  const image = useImage(values, scale);
  if (!across || !up || !series || !values || !scale) return null;
  const x = linearScale(across.from, across.to, frame.left, frame.right);
  const y = linearScale(up.from, up.to, frame.bottom, frame.top);
  return (
    <div>
      <div ref={box} className={styles.box} data-own-pointer="">
        <svg
          ref={svg}
          className={styles.plot}
          width={Math.max(frame.right + 8, 1)}
          height={frame.bottom + 44}
          role="img"
          aria-label={`Map of ${series.name} over ${symbolText(across.name)} and ${symbolText(up.name)}`}
        >
          <image
            ref={image}
            x={frame.left}
            y={frame.top}
            width={side}
            height={frame.bottom - frame.top}
            preserveAspectRatio="none"
            className={styles.picture}
          />
          <HorizontalAxis frame={frame} domain={across} scale={x} name={symbolText(across.name)} />
          <VerticalAxis frame={frame} domain={up} scale={y} name={symbolText(up.name)} rules={false} />
        </svg>
        <MapReadout result={result} frame={frame} />
      </div>
      <ColourScale scale={scale} />
    </div>
  );
});

/** Paints the values into a picture, one point a value, when they change. */
function useImage(values: MapValues | undefined, scale: MapScale | null): RefObject<SVGImageElement | null> {
  const image = useRef<SVGImageElement>(null);
  useEffect(() => {
    const width = values?.[0]?.length ?? 0;
    if (!values || !scale || width === 0) return;
    const canvas = document.createElement('canvas');
    canvas.width = width;
    canvas.height = values.length;
    const context = canvas.getContext('2d');
    if (!context) return;
    const pixels = context.createImageData(width, values.length);
    values.forEach((row, at) => {
      // The first row is the lowest; a picture begins at the top.
      const line = (values.length - 1 - at) * width;
      row.forEach((value, column) => {
        if (value === null || !Number.isFinite(value)) return;
        pixels.data.set([...rampColour(scale.part(value)), 255], 4 * (line + column));
      });
    });
    context.putImageData(pixels, 0, 0);
    image.current?.setAttribute('href', canvas.toDataURL());
  }, [values, scale]);
  return image;
}

const LABELS = [0, 0.25, 0.5, 0.75, 1];

function ColourScale({ scale }: { readonly scale: MapScale }) {
  const ramp = rampSteps(12)
    .map(([part, colour]) => `${colour} ${(part * 100).toFixed(1)}%`)
    .join(', ');
  return (
    <div className={styles.scale}>
      <div className={styles.ramp} style={{ background: `linear-gradient(to right, ${ramp})` }} />
      <ul className={styles.numbers} aria-label={`Colour scale, ${scale.kind}, dark to light`}>
        {LABELS.map((part) => (
          <li key={part}>{readoutText(Number(scale.valueAt(part).toPrecision(3)))}</li>
        ))}
      </ul>
      <p className={styles.kind}>dark to light, {scale.kind}; nothing drawn where the value is not finite</p>
    </div>
  );
}
