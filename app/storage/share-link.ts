/** The first character of the fragment says how the rest is packed; 1: deflate-raw, then base64url. */
const PACKING = '1';

async function through(bytes: Uint8Array<ArrayBuffer>, stream: CompressionStream | DecompressionStream) {
  const packed = new Blob([bytes]).stream().pipeThrough(stream);
  return new Uint8Array(await new Response(packed).arrayBuffer());
}

/** Fragment of a link that holds the whole text; readable back by `textInFragment`, for ever. */
export async function fragmentOf(text: string): Promise<string> {
  const packed = await through(new TextEncoder().encode(text), new CompressionStream('deflate-raw'));
  let letters = '';
  for (const byte of packed) letters += String.fromCharCode(byte);
  return PACKING + btoa(letters).replaceAll('+', '-').replaceAll('/', '_').replaceAll('=', '');
}

/** The text a fragment holds; null when it holds none, or a damaged one. */
export async function textInFragment(fragment: string): Promise<string | null> {
  const bare = fragment.replace(/^#/, '');
  if (!bare.startsWith(PACKING) || !/^[\w-]+$/.test(bare)) return null;
  try {
    const letters = atob(bare.slice(PACKING.length).replaceAll('-', '+').replaceAll('_', '/'));
    const packed = Uint8Array.from(letters, (letter) => letter.charCodeAt(0));
    const bytes = await through(packed, new DecompressionStream('deflate-raw'));
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return null;
  }
}
