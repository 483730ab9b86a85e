type PlotlyModule = typeof import('plotly.js-dist-min');

/** Evaluating the library freezes the page for a moment, so it waits until nobody has typed for this long. */
const QUIET_MS = 1000;

let lastKey = 0;
addEventListener(
  'keydown',
  () => {
    lastKey = performance.now();
  },
  { capture: true, passive: true },
);

async function quiet(): Promise<void> {
  for (let rest = QUIET_MS; rest > 0; ) {
    rest = lastKey === 0 ? 0 : lastKey + QUIET_MS - performance.now();
    if (rest > 0) await new Promise((done) => setTimeout(done, rest));
  }
}

/** The exploring library, fetched when first asked for. It is CommonJS and comes as a default. */
export async function loadPlotly(): Promise<PlotlyModule> {
  await quiet();
  const module = await import('plotly.js-dist-min');
  // Its types speak of named exports; the bundler puts a CommonJS module under `default`.
  return 'default' in module ? (module.default as PlotlyModule) : module;
}
