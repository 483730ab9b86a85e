import type { PlotResult } from '../../engine/requests/result';
import { download, downloadText } from '../storage/files';

/** What a drawing needs written into it once it leaves the page and its style sheets. */
const carried = [
  'fill',
  'stroke',
  'stroke-width',
  'stroke-dasharray',
  'stroke-linejoin',
  'font-family',
  'font-size',
  'font-style',
  'text-anchor',
  'image-rendering',
] as const;

/** The drawing as a file of its own, always as on light paper. */
export function standaloneSvg(svg: SVGSVGElement): string {
  const desk = document.createElement('div');
  desk.style.cssText = 'position:absolute;inset-inline-start:-10000px;color-scheme:light';
  const copy = svg.cloneNode(true);
  if (!(copy instanceof SVGSVGElement)) return '';
  desk.append(copy);
  document.body.append(desk);
  for (const element of copy.querySelectorAll<SVGElement>('*')) {
    const style = getComputedStyle(element);
    for (const property of carried) element.style.setProperty(property, style.getPropertyValue(property));
    element.removeAttribute('class');
  }
  desk.remove();
  const box = svg.getBoundingClientRect();
  copy.removeAttribute('class');
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg');
  copy.setAttribute('viewBox', `0 0 ${box.width} ${box.height}`);
  copy.setAttribute('style', 'background:#ffffff');
  return new XMLSerializer().serializeToString(copy);
}

export function saveSvg(svg: SVGSVGElement, file: string): void {
  downloadText(file, standaloneSvg(svg), 'image/svg+xml');
}

/** Twice the size on screen, enough for print at a column's width. */
const SHARPNESS = 2;

export async function savePng(svg: SVGSVGElement, file: string): Promise<void> {
  const box = svg.getBoundingClientRect();
  const picture = new Image();
  picture.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(standaloneSvg(svg))}`;
  await picture.decode();
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(box.width * SHARPNESS);
  canvas.height = Math.round(box.height * SHARPNESS);
  const context = canvas.getContext('2d');
  if (!context) throw new Error('no canvas to draw on');
  context.fillStyle = '#ffffff';
  context.fillRect(0, 0, canvas.width, canvas.height);
  context.drawImage(picture, 0, 0, canvas.width, canvas.height);
  const blob = await new Promise<Blob | null>((done) => canvas.toBlob(done, 'image/png'));
  if (!blob) throw new Error('the picture could not be packed');
  download(file, blob);
}

function quoted(word: string): string {
  return /[",\n]/.test(word) ? `"${word.replaceAll('"', '""')}"` : word;
}

const cell = (value: number | null | undefined) => (value === null || value === undefined ? '' : String(value));

/** Every point: one line a point of the axis, or of the plane for a map; values that are not finite stay empty. */
export function csvOf(result: PlotResult): string {
  const [across, up] = result.axes;
  const [first] = result.series;
  if (!across || !first) return '';
  if (first.z && up) {
    const rows = first.z.flatMap((row, line) =>
      row.map((value, column) => [cell(first.x[column]), cell(first.y[line]), cell(value)].join(',')),
    );
    return [[across.name, up.name, first.name].map(quoted).join(','), ...rows, ''].join('\n');
  }
  const columns = [...result.series, ...result.asymptotes];
  const rows = first.x.map((x, at) => [cell(x), ...columns.map(({ y }) => cell(y[at]))].join(','));
  return [[across.name, ...columns.map(({ name }) => name)].map(quoted).join(','), ...rows, ''].join('\n');
}

export function saveCsv(result: PlotResult, file: string): void {
  downloadText(file, csvOf(result), 'text/csv');
}
