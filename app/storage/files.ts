export function download(name: string, content: Blob): void {
  const url = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The browser has taken the content once the click has been handled; a little later it can be let go.
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}

export function downloadText(name: string, text: string, type = 'text/plain'): void {
  download(name, new Blob([text], { type: `${type};charset=utf-8` }));
}

/** A file name made of words, from a title. */
export function fileName(title: string, ending: string): string {
  const words = title
    .toLowerCase()
    .normalize('NFKD')
    .replace(/\p{Mark}/gu, '')
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  return `${words || 'notebook'}.${ending}`;
}

/** A text file the user picks; null when none was picked. */
export function pickTextFile(accept: string): Promise<string | null> {
  return new Promise((resolve, reject) => {
    const field = document.createElement('input');
    field.type = 'file';
    field.accept = accept;
    field.addEventListener('change', () => {
      const file = field.files?.[0];
      if (file) file.text().then(resolve, reject);
      else resolve(null);
    });
    field.addEventListener('cancel', () => resolve(null));
    field.click();
  });
}

/** False where the browser does not let the page write to the clipboard. */
export async function copyText(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false;
  }
}
