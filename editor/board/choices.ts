import { type LinkEnd, nodeName, nodesById } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';
import type { Choice } from './chooser.ts';
import { outputsFor } from './fits.ts';

/** Every node type of the stock. */
export function stockChoices(store: Store): Choice[] {
  return store.session.library.packs.flatMap((pack) =>
    pack.nodes.map(({ type, title, help }) => ({ id: type, title, group: pack.name, help })),
  );
}

/** Every node of the document, by name. */
export function nodeChoices(store: Store): Choice[] {
  const { library } = store.session;
  return store.document.nodes.map((record) => ({
    id: record.id,
    title: nodeName(record, library),
    group: library.find(record.type)?.title ?? record.type,
    help: record.remark ?? '',
  }));
}

/** What can be linked to an input, and the links that it has, to be taken off. */
export function linkChoices(store: Store, to: LinkEnd): Choice[] {
  const links = store.linksInto(...to);
  const has = links.map(({ from }) => JSON.stringify(from));
  return [
    ...links.map(({ from }, i) => ({
      id: JSON.stringify({ off: i }),
      title: `Take off ${outputTitle(store, from)}`,
      group: 'Linked now',
      help: links.length > 1 ? `Link ${i + 1} of ${links.length}` : '',
    })),
    ...outputsFor(store, to)
      .filter((from) => !has.includes(JSON.stringify(from)))
      .map((from) => ({
        id: JSON.stringify(from),
        title: outputTitle(store, from),
        group: 'Link',
        help: '',
      })),
  ];
}

/** Carries out one of `linkChoices`. */
export function chooseLink(store: Store, to: LinkEnd, chosen: string): void {
  const choice = JSON.parse(chosen) as LinkEnd | { readonly off: number };
  if ('off' in choice) {
    const link = store.linksInto(...to)[choice.off];
    if (link !== undefined) store.removeLink(link);
  } else store.addLink({ from: choice, to });
}

function outputTitle(store: Store, [id, port]: LinkEnd): string {
  const { library } = store.session;
  const record = nodesById(store.document).get(id);
  const output = record === undefined ? undefined : library.find(record.type)?.outputs[port];
  const name = record === undefined ? id : nodeName(record, library);
  return output === undefined || output.title === name ? name : `${name}: ${output.title}`;
}
