import { memo, useEffect, useState } from 'react';
import type { ProseCard as ProseCardData } from '../../engine/requests/result';
import { CardFrame } from './card-frame';
import styles from './prose-card.module.css';

type RenderProse = (text: string) => string;

/** CommonMark comes in a chunk of its own; until it is there the words stand as they were typed. */
let rendered: RenderProse | null = null;
const arriving = import('./prose').then((module) => {
  rendered = module.renderProse;
  return rendered;
});

function useProse(): RenderProse | null {
  const [render, setRender] = useState<RenderProse | null>(() => rendered);
  useEffect(() => {
    let gone = false;
    arriving.then(
      (arrived) => gone || setRender(() => arrived),
      () => undefined,
    );
    return () => {
      gone = true;
    };
  }, []);
  return render;
}

export function ProseCard({ card }: { readonly card: ProseCardData }) {
  return (
    <CardFrame card={card} label="Text">
      <Prose text={card.text} />
    </CardFrame>
  );
}

const Prose = memo(function Prose({ text }: { readonly text: string }) {
  const render = useProse();
  if (!render) return <div className={`${styles.prose} ${styles.plain}`}>{text}</div>;
  // biome-ignore lint/security/noDangerouslySetInnerHtml: raw HTML is escaped and formulas are KaTeX's
  return <div className={styles.prose} dangerouslySetInnerHTML={{ __html: render(text) }} />;
});
