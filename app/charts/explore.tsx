import { useEffect, useRef, useState } from 'react';
import type { PlotResult } from '../../engine/requests/result';
import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import { useStore } from '../state/store';
import styles from './explore.module.css';
import { downloadDataUrl, exploreFigure } from './explore-figure';
import { loadPlotly } from './load-plotly';

type Plotly = Awaited<ReturnType<typeof loadPlotly>>;

interface ExploreProps {
  readonly result: PlotResult;
  readonly file: string;
}

/** The same curves or map to zoom into and to move about in. */
export function Explore({ result, file }: ExploreProps) {
  const { settings } = useSession();
  const { theme } = useStore(settings.state);
  const place = useRef<HTMLElement>(null);
  const [plotly, setPlotly] = useState<Plotly | null>(null);
  const [trouble, setTrouble] = useState('');
  const [drawn, setDrawn] = useState(0);

  useEffect(() => {
    let gone = false;
    loadPlotly().then(
      (loaded) => gone || setPlotly(() => loaded),
      () =>
        gone ||
        setTrouble('The exploring part could not be loaded; without a connection it must have been used once before.'),
    );
    return () => {
      gone = true;
    };
  }, []);

  // biome-ignore lint/correctness/useExhaustiveDependencies: colours come from the theme, and drawing anew is the way back to the whole range
  useEffect(() => {
    const element = place.current;
    if (!plotly || !element) return;
    const { data, layout } = exploreFigure(result, getComputedStyle(element));
    plotly
      .react(element, data, layout, { displayModeBar: false, responsive: true, scrollZoom: true, displaylogo: false })
      .catch((error: unknown) => setTrouble(String(error)));
  }, [plotly, result, theme, drawn]);

  useEffect(() => {
    const element = place.current;
    return () => {
      if (plotly && element) plotly.purge(element);
    };
  }, [plotly]);

  async function savePng(): Promise<void> {
    const element = place.current;
    if (plotly && element)
      downloadDataUrl(file, await plotly.toImage(element, { format: 'png', scale: 2, width: 900, height: 560 }));
  }

  return (
    <div>
      <figure ref={place} className={styles.place} aria-label="Plot to explore" data-own-pointer="">
        {plotly || trouble ? null : <p className={styles.says}>Fetching the exploring part…</p>}
      </figure>
      {trouble ? <p className={styles.says}>{trouble}</p> : null}
      {plotly ? (
        <p className={styles.says}>
          Drag to zoom, scroll to zoom at the pointer, drag an axis to move along it.{' '}
          <WordButton onClick={() => setDrawn(drawn + 1)}>Whole range</WordButton>{' '}
          <WordButton onClick={() => void savePng()}>PNG of this view</WordButton>
        </p>
      ) : null}
    </div>
  );
}
