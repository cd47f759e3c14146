/** The ready graphs, loaded one by one when they are asked for. */
const files = import.meta.glob<string>('../../graphs/*.skewback.json', { query: '?raw', import: 'default' });

/** The names of the ready graphs, and the text of each. */
export const readyGraphs: readonly { readonly name: string; readonly text: () => Promise<string> }[] =
  Object.entries(files).map(([path, text]) => ({
    name: path.replace(/^.*\//, '').replace('.skewback.json', ''),
    text,
  }));
