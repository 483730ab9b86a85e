import { micromark, type Options } from 'micromark';
import { math } from 'micromark-extension-math';
import { renderTex } from './render-tex';

type HtmlExtension = NonNullable<Options['htmlExtensions']>[number];

/** `$...$`, `$$...$$` and fenced `$$` blocks by KaTeX; a doubled dollar stands in display style wherever it is. */
function formulas(): HtmlExtension {
  let marks = 0;
  return {
    enter: {
      mathFlow() {
        this.lineEndingIfNeeded();
        this.tag('<p>');
      },
      mathFlowFenceMeta() {
        this.buffer();
      },
      mathText() {
        marks = 0;
        this.buffer();
      },
      mathTextSequence(token) {
        marks = this.sliceSerialize(token).length;
      },
    },
    exit: {
      mathFlow() {
        const value = this.resume();
        this.tag(renderTex(value.replace(/\r?\n$/, ''), true));
        this.tag('</p>');
        this.setData('mathFlowOpen');
        this.setData('slurpOneLineEnding');
      },
      mathFlowFence() {
        if (this.getData('mathFlowOpen')) return;
        this.setData('mathFlowOpen', true);
        this.setData('slurpOneLineEnding', true);
        this.buffer();
      },
      mathFlowFenceMeta() {
        this.resume();
      },
      mathFlowValue(token) {
        this.raw(this.sliceSerialize(token));
      },
      mathText() {
        this.tag(renderTex(this.resume(), marks > 1));
      },
      mathTextData(token) {
        this.raw(this.sliceSerialize(token));
      },
    },
  };
}

/**
 * CommonMark to HTML. Raw HTML is shown as typed; links lead to safe protocols only and open beside the notebook;
 * images are not fetched, since a shared notebook must not make its reader call other places.
 */
export function renderProse(text: string): string {
  const html = micromark(text, {
    extensions: [math(), { disable: { null: ['labelStartImage'] } }],
    htmlExtensions: [formulas()],
  });
  // Text and attributes are escaped, so that this can only be the beginning of a link of micromark's own.
  return html.replaceAll('<a href=', '<a target="_blank" rel="noopener noreferrer" href=');
}
