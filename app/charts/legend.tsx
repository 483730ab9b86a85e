import type { PlotResult, PlotSeries } from '../../engine/requests/result';
import { numbered } from '../state/numbered';
import styles from './legend.module.css';
import { asymptoteColour, lineStyle } from './line-styles';

/** The two ends of one curve share an asymptote's name. */
function distinct(series: readonly PlotSeries[]): readonly PlotSeries[] {
  return series.filter(({ name }, at) => series.findIndex((other) => other.name === name) === at);
}

/** Which line is which; left out where there is one line only. */
export function Legend({ result }: { readonly result: PlotResult }) {
  const entries = [
    ...result.series.map(({ name }, at) => ({ name, ...lineStyle(at), width: 2 })),
    ...distinct(result.asymptotes).map(({ name }, at) => ({
      name,
      colour: asymptoteColour(result, at),
      dash: '3 3',
      width: 1,
    })),
  ];
  if (entries.length < 2) return null;
  return (
    <ul className={styles.legend} aria-label="Lines">
      {numbered(entries, ({ name }) => name).map(({ key, item: entry }) => (
        <li key={key}>
          <svg width="30" height="10" aria-hidden="true">
            <line
              x1="0"
              x2="30"
              y1="5"
              y2="5"
              style={{ stroke: entry.colour, strokeWidth: entry.width, strokeDasharray: entry.dash }}
            />
          </svg>
          {entry.name}
        </li>
      ))}
    </ul>
  );
}
