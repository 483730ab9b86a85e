/** A word to a worker that is busy: whoever holds the token may ask whether its work is still wanted. */
export interface StopToken {
  readonly token: string;
  /** From now on the work is not wanted. */
  readonly stop: () => void;
}

/**
 * A busy worker reads no messages, and memory shared between threads needs headers that a static host seldom sends. An
 * object URL needs neither: the page revokes it, and the worker finds that it can no longer be fetched.
 */
export function createStopToken(): StopToken {
  const token = URL.createObjectURL(new Blob(['wanted'], { type: 'text/plain' }));
  return { token, stop: () => URL.revokeObjectURL(token) };
}

/** Whether the work of a token is still wanted; for workers only, since it waits for the answer (well under 1 ms). */
export function isStillWanted(token: string): boolean {
  const request = new XMLHttpRequest();
  try {
    request.open('GET', token, false);
    request.send();
    return request.status === 200;
  } catch {
    return false;
  }
}
