import { Fragment, memo } from 'react';
import { renderTex } from './render-tex';
import { sentenceParts } from './sentence-parts';

interface TexProps {
  readonly tex: string;
  readonly display?: boolean;
}

/** A formula; drawn again only when its LaTeX changes. */
export const Tex = memo(function Tex({ tex, display = false }: TexProps) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: KaTeX's own output, with `trust` off
  return <span dangerouslySetInnerHTML={{ __html: renderTex(tex, display) }} />;
});

/** A sentence with `$...$` formulas and words of the notebook between backticks in it. */
export const Says = memo(function Says({ text }: { readonly text: string }) {
  return sentenceParts(text).map(({ kind, part, place }) =>
    kind === 'formula' ? (
      <Tex key={place} tex={part} />
    ) : kind === 'word' ? (
      <code key={place} className="typed">
        {part}
      </code>
    ) : (
      <Fragment key={place}>{part}</Fragment>
    ),
  );
});
