import { useRef, useState } from 'react';
import type { ParameterCard, PlotResult, RequestCard } from '../../engine/requests/result';
import { CurvePlot } from '../charts/curve-plot';
import { Explore } from '../charts/explore';
import { saveCsv, savePng, saveSvg } from '../charts/export';
import { MapPlot } from '../charts/map-plot';
import { Slider } from '../charts/slider';
import { ValueTable } from '../charts/value-table';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import { fileName } from '../storage/files';
import { PartChoice } from './part-choice';
import styles from './plot-body.module.css';
import { useLivePlot } from './use-live-plot';
import { WordButton } from './word-button';

interface PlotProps {
  readonly card: RequestCard;
  readonly result: PlotResult;
}

export function PlotBody({ card, result }: PlotProps) {
  const { outline } = useSession();
  const svg = useRef<SVGSVGElement>(null);
  const [exploring, setExploring] = useState(false);
  const { shown, held } = useLivePlot(card, result);
  const cards = useSelected(outline.state, (state) => state.cards);
  const sliders = cards.filter(
    (other): other is ParameterCard =>
      other.kind === 'let' && other.range !== null && card.parameters.includes(other.name),
  );
  const isMap = shown.axes.length > 1;
  return (
    <div data-plot={card.id}>
      {exploring ? (
        <Explore result={shown} file={fileName(card.text, 'png')} />
      ) : isMap ? (
        <MapPlot result={shown} svg={svg} />
      ) : (
        <CurvePlot result={shown} held={held} svg={svg} />
      )}
      {sliders.length > 0 ? (
        <div className={styles.sliders}>
          {sliders.map((slider) => (
            <Slider key={slider.id} card={slider} />
          ))}
        </div>
      ) : null}
      <div className={styles.below}>
        <PartChoice card={card} curves={shown.series.length} />
        <WordButton aria-pressed={exploring} onClick={() => setExploring(!exploring)}>
          {exploring ? 'Back to the drawing' : 'Explore'}
        </WordButton>
        <ValueTable result={shown} />
      </div>
    </div>
  );
}

/** What can be taken out of a plot. The drawing itself is found by the card it stands in. */
export function PlotTools({ card, result }: PlotProps) {
  const { notices } = useSession();
  const drawing = () => document.querySelector<SVGSVGElement>(`[data-plot="${CSS.escape(card.id)}"] svg[role="img"]`);

  function taken(ending: string, take: (svg: SVGSVGElement, file: string) => void): void {
    const svg = drawing();
    const file = fileName(card.text, ending);
    if (!svg) {
      notices.say('Go back to the drawing first: that is what is saved.');
      return;
    }
    take(svg, file);
    notices.say(`Saved as ${file}.`);
  }

  return (
    <>
      <WordButton aria-label={`SVG of ${card.caption}`} onClick={() => taken('svg', saveSvg)}>
        SVG
      </WordButton>
      <WordButton
        aria-label={`PNG of ${card.caption}`}
        onClick={() =>
          taken('png', (svg, file) => {
            savePng(svg, file).catch((error: unknown) => notices.say(`No picture could be made: ${String(error)}`));
          })
        }
      >
        PNG
      </WordButton>
      <WordButton
        aria-label={`CSV of ${card.caption}`}
        onClick={() => {
          saveCsv(result, fileName(card.text, 'csv'));
          notices.say(`Saved as ${fileName(card.text, 'csv')}.`);
        }}
      >
        CSV
      </WordButton>
    </>
  );
}
