import { builtIn } from '../../nodes/index.ts';
import type { InputSpec, NodeType } from '../graph/index.ts';
import { type Output, readArguments } from './call.ts';

/** `skewback nodes [--json]`: every node type. */
export function nodes(args: readonly string[], out: Output): number {
  const { values } = readArguments(args, { json: { type: 'boolean', default: false } });
  if (values.json) {
    const described = { format: 'skewback-nodes', version: 1, nodes: builtIn.nodes.map(describe) };
    out.print(`${JSON.stringify(described, null, 2)}\n`);
    return 0;
  }
  for (const node of builtIn.nodes) out.print(`${page(node)}\n`);
  return 0;
}

function describe(node: NodeType) {
  return {
    type: node.type,
    title: node.title,
    band: node.band,
    help: node.help,
    inputs: Object.entries(node.inputs).map(([name, spec]) => ({
      name,
      title: spec.title,
      kind: spec.kind.name,
      links: spec.arity,
      ...(spec.default === undefined ? {} : { default: spec.default }),
    })),
    settings: Object.entries(node.settings).map(([name, { title, form, default: initial }]) => ({
      name,
      title,
      form: form.form,
      ...(form.form === 'choice' ? { options: form.options } : {}),
      ...(initial === undefined ? {} : { default: initial }),
    })),
    outputs: Object.entries(node.outputs).map(([name, spec]) => ({
      name,
      title: spec.title,
      kind: spec.kind.name,
      list: spec.many,
    })),
    example: node.example,
  };
}

function page(node: NodeType): string {
  const lines = [`${node.type}: ${node.title}`, `  ${node.help}`];
  for (const [name, spec] of Object.entries(node.inputs)) {
    lines.push(`  input   ${name}: ${spec.title} (${takes(spec)})`);
  }
  for (const [name, { title, form, default: initial }] of Object.entries(node.settings)) {
    const may = form.form === 'choice' ? Object.keys(form.options).join(', ') : form.form;
    lines.push(`  setting ${name}: ${title} (${may}${initial === undefined ? '' : `; ${initial}`})`);
  }
  for (const [name, { title, kind, many }] of Object.entries(node.outputs)) {
    lines.push(`  output  ${name}: ${title} (${many ? `list of ${kind.name}` : kind.name})`);
  }
  return `${lines.join('\n')}\n`;
}

function takes({ kind, arity, default: initial }: InputSpec<unknown>): string {
  const what =
    arity === 'many'
      ? `any number of ${kind.name}`
      : arity === 'optional'
        ? `${kind.name}, or none`
        : kind.name;
  return initial === undefined ? what : `${what}; ${initial}`;
}
