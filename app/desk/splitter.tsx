import { type KeyboardEvent, type PointerEvent, useRef } from 'react';
import { useSession } from '../state/session';
import { SPLIT_RANGE } from '../state/settings';
import { useSelected } from '../state/store';
import styles from './splitter.module.css';

const STEP = 2;

/** The border between text and page: dragged, or moved by the arrow keys. */
export function Splitter() {
  const { settings } = useSession();
  const split = useSelected(settings.state, (state) => state.split);
  const dragging = useRef(false);

  function move(to: number): void {
    settings.change({ split: Math.max(SPLIT_RANGE.from, Math.min(SPLIT_RANGE.to, Math.round(to * 10) / 10)) });
  }

  function follow(event: PointerEvent<HTMLElement>): void {
    const desk = event.currentTarget.parentElement?.getBoundingClientRect();
    if (dragging.current && desk) move((100 * (event.clientX - desk.left)) / desk.width);
  }

  function step(event: KeyboardEvent): void {
    const moves: Readonly<Record<string, number>> = {
      ArrowLeft: split - STEP,
      ArrowRight: split + STEP,
      Home: SPLIT_RANGE.from,
      End: SPLIT_RANGE.to,
    };
    const next = moves[event.key];
    if (next === undefined) return;
    event.preventDefault();
    move(next);
  }

  return (
    // biome-ignore lint/a11y/useSemanticElements: a rule cannot be moved; the window splitter pattern asks for this role
    <div
      className={styles.splitter}
      role="separator"
      tabIndex={0}
      aria-label="Border between text and page"
      aria-orientation="vertical"
      aria-controls="text-half"
      aria-valuemin={SPLIT_RANGE.from}
      aria-valuemax={SPLIT_RANGE.to}
      aria-valuenow={split}
      aria-valuetext={`text ${Math.round(split)} per cent`}
      onPointerDown={(event) => {
        dragging.current = true;
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={follow}
      onPointerUp={() => {
        dragging.current = false;
      }}
      onPointerCancel={() => {
        dragging.current = false;
      }}
      onKeyDown={step}
    />
  );
}
