export interface Example {
  readonly file: string;
  readonly title: string;
  readonly says: string;
}

function isExample(value: unknown): value is Example {
  if (typeof value !== 'object' || value === null) return false;
  return ['file', 'title', 'says'].every((key) => key in value && typeof Reflect.get(value, key) === 'string');
}

const FOLDER = './examples/';
export const FIRST_EXAMPLE = 'first-light.lathe';

async function fetched(file: string): Promise<Response> {
  const response = await fetch(FOLDER + file);
  if (!response.ok) throw new Error(`${file}: ${response.status} ${response.statusText}`);
  return response;
}

export async function listExamples(): Promise<readonly Example[]> {
  const list: unknown = await (await fetched('list.json')).json();
  return Array.isArray(list) ? list.filter(isExample) : [];
}

export async function exampleText(file: string): Promise<string> {
  return (await fetched(file)).text();
}
