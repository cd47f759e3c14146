/** A file's content after JSON has been read and before its shape is known. */
export type RawDocument = Readonly<Record<string, unknown>>;

/**
 * Steps from each version of the format to the next: the step at index i takes version i + 1 to i + 2. A step
 * changes what it knows and passes on everything else, and leaves alone what is not of the shape it expects:
 * the schema says what is wrong with that.
 */
export const migrations: readonly ((raw: RawDocument) => RawDocument)[] = [linksAsEnds];

/** Version 1 wrote a link as four members: from, output, to, input. */
function linksAsEnds(raw: RawDocument): RawDocument {
  if (!Array.isArray(raw.links)) return raw;
  const links = raw.links.map((link: unknown) => {
    if (typeof link !== 'object' || link === null || !('output' in link) || !('input' in link)) return link;
    const { from, output, to, input, ...others } = link as Record<string, unknown>;
    return { from: [from, output], to: [to, input], ...others };
  });
  return { ...raw, links };
}
