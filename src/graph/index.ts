/** Floor 4: kinds, node types and packs; the document, its file and its edits; tracing and the live session. */
export {
  type AnyNodeDeclaration,
  BANDS,
  type Band,
  defineNode,
  definePack,
  type Example,
  type InputSpec,
  type InputSpecs,
  input,
  Library,
  many,
  type NodeContext,
  type NodeType,
  type OutputSpec,
  optional,
  output,
  outputs,
  type Pack,
} from './define.ts';
export {
  emptyDocument,
  FORMAT_VERSION,
  type GraphDocument,
  type Link,
  type LinkEnd,
  type NodeRecord,
  nodesById,
} from './document.ts';
export { type Applied, apply, changesOnlyValues, type Edit, EditError, removalOf } from './edit.ts';
export { FileError, readGraph, writeGraph } from './file.ts';
export { type Expression, namesIn, parseFormula, traceFormula } from './formula/index.ts';
export {
  conversion,
  defineKind,
  type Kind,
  type LineType,
  type Literal,
  quantity,
  resolve,
  scalarKind,
  scalarsIn,
} from './kind.ts';
export * as kinds from './kinds.ts';
export { LIMITS } from './limits.ts';
export { LiveGraph, type NodeState } from './live.ts';
export type { Figures, Mark, XY } from './mark.ts';
export { orderNodes } from './order.ts';
export { type Reading, readings, type Slider, sliders } from './rail.ts';
export { type SceneItem, sceneOf } from './scene.ts';
export { documentSchema } from './schema.ts';
export { Session } from './session.ts';
export { choice, flag, optionalQuantity, type SettingForm, type SettingSpec, text } from './setting.ts';
export { type SlipMeasures, tidyPlaces } from './tidy.ts';
export { nodeName, readSettings, type TracedGraph, type TracedNode, traceGraph } from './traceGraph.ts';
