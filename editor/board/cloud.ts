/**
 * A revision cloud about a rectangle, as a checker marks a drawing: half circles along its sides.
 *
 * @returns the path, in the units of the rectangle.
 */
export function cloudAbout(x: number, y: number, width: number, height: number): string {
  const [left, top, right, bottom] = [x - 8, y - 8, x + width + 8, y + height + 8];
  const side = (from: readonly [number, number], to: readonly [number, number]): string => {
    const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
    const count = Math.max(2, Math.round(length / 22));
    return Array.from({ length: count }, (_, i) => {
      const t = (i + 1) / count;
      const r = length / count / 2;
      return `A${r} ${r} 0 0 1 ${from[0] + (to[0] - from[0]) * t} ${from[1] + (to[1] - from[1]) * t}`;
    }).join('');
  };
  const corners = [
    [left, top],
    [right, top],
    [right, bottom],
    [left, bottom],
  ] as const;
  return `M${left} ${top}${corners.map((corner, i) => side(corner, corners[(i + 1) % 4] ?? corner)).join('')}`;
}

/** A text in lines of about so many signs. */
export function linesOf(text: string, signs: number): string[] {
  const lines: string[] = [''];
  for (const word of text.split(' ')) {
    const last = lines.at(-1) ?? '';
    if (last !== '' && last.length + word.length > signs) lines.push(word);
    else lines[lines.length - 1] = last === '' ? word : `${last} ${word}`;
  }
  return lines;
}
