import type { ButtonHTMLAttributes } from 'react';
import styles from './word-button.module.css';

/** A word that does something: how this page writes its buttons. */
export function WordButton({ className, ...rest }: ButtonHTMLAttributes<HTMLButtonElement>) {
  return <button type="button" className={`${styles.word} ${className ?? ''}`} {...rest} />;
}
