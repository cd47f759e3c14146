import type { ClassicPreset, GetSchemes } from 'rete';

/** The skeleton's notion of nodes and links. Ours are the document's; it holds ids and places only. */
export type Schemes = GetSchemes<
  ClassicPreset.Node,
  ClassicPreset.Connection<ClassicPreset.Node, ClassicPreset.Node> & { readonly isPseudo?: boolean }
>;
