import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import AxeBuilder from 'axe-core';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { main } from '../../src/cli/main.ts';
import { Editor, readingOn } from './harness.ts';

let editor: Editor;

beforeAll(async () => {
  editor = await Editor.start();
}, 120_000);

afterAll(async () => {
  await editor?.stop();
});

/** Runs a test in a window of its own, and closes it. */
function inWindow(
  act: (page: Page) => Promise<void>,
  options: Parameters<Editor['open']>[0] = {},
): () => Promise<void> {
  return async () => {
    const page = await editor.open(options);
    await act(page);
    await page.close();
  };
}

/** The readings that the command line prints for a graph's text. */
function byCommandLine(text: string): Record<string, string> {
  const file = join(mkdtempSync(join(tmpdir(), 'skewback-')), 'saved.skewback.json');
  writeFileSync(file, text);
  let printed = '';
  main(['evaluate', file, '--json'], { print: (part) => (printed += part), error: () => {} });
  const { readings } = JSON.parse(printed) as { readings: { name: string; text: string }[] };
  return Object.fromEntries(readings.map(({ name, text: value }) => [name, value.replaceAll('\u00a0', ' ')]));
}

async function savedText(page: Page): Promise<string> {
  // Without the browser's own file dialogs the graph is downloaded.
  const waiting = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  const download = await waiting;
  const stream = await download.createReadStream();
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part as Buffer);
  return Buffer.concat(parts).toString('utf8');
}

describe('the editor', () => {
  it(
    'opens on a ready arch that already works',
    inWindow(async (page) => {
      expect(await page.getByLabel('Title of the graph').inputValue()).toBe('Market hall');
      expect(await readingOn(page, 'left-knee-moment')).toBe('−298.8 kN·m');
      expect(await page.getByRole('img', { name: 'Elevation of the arch' }).isVisible()).toBe(true);
      await page.getByRole('img', { name: 'Hall of 8 bays' }).waitFor();
      expect(await page.getByRole('button', { name: 'No queries' }).isVisible()).toBe(true);
    }),
  );

  it(
    'moves figures and drawing with a slider, by the arrow keys and by typing, and takes it back',
    inWindow(async (page) => {
      const axis = page.locator('sk-elevation path.axis').first();
      const before = await axis.getAttribute('d');
      await page.getByRole('slider', { name: 'Rise of the crown' }).press('ArrowRight');
      expect(await page.getByLabel('Rise of the crown, exact', { exact: true }).inputValue()).toBe('9.6 m');
      expect(await axis.getAttribute('d')).not.toBe(before);
      const moved = await readingOn(page, 'left-knee-moment');
      expect(moved).not.toBe('−298.8 kN·m');
      await page.getByLabel('Rise of the crown, exact', { exact: true }).fill('33 ft 6 in');
      await page.getByLabel('Rise of the crown, exact', { exact: true }).press('Enter');
      expect(await readingOn(page, 'left-knee-moment')).not.toBe(moved);
      await page.getByRole('button', { name: 'Undo' }).click();
      await page.getByRole('button', { name: 'Undo' }).click();
      expect(await readingOn(page, 'left-knee-moment')).toBe('−298.8 kN·m');
      expect(await axis.getAttribute('d')).toBe(before);
      await page.getByRole('button', { name: 'Redo' }).click();
      expect(await readingOn(page, 'left-knee-moment')).toBe(moved);
    }),
  );

  it(
    'marks a query by a cloud, lists it, and leads to its node',
    inWindow(async (page) => {
      await page.getByLabel('Span, exact', { exact: true }).fill('24 kN');
      await page.getByLabel('Span, exact', { exact: true }).press('Enter');
      const words = '"24 kN" is a force where a length is wanted';
      await page.getByRole('button', { name: /1 query/ }).click();
      const line = page.getByRole('dialog', { name: 'Queries' }).getByRole('button', { name: words });
      await line.click();
      expect(await page.locator('sk-board .cloud').count()).toBe(1);
      expect(await page.locator('sk-slip[selected]').getAttribute('waits')).not.toBeNull();
      expect(await readingOn(page, 'left-knee-moment')).toBe('waits');
      expect(await page.getByLabel('Span, exact', { exact: true }).inputValue()).toBe('24 kN');
    }),
  );

  it(
    'takes a node from the stock and links it, by keys alone',
    inWindow(async (page) => {
      await page.getByRole('button', { name: 'New', exact: true }).click();
      await page.getByText('The board is empty.').waitFor();
      const add = async (words: string): Promise<void> => {
        await page.getByLabel('Board', { exact: true }).focus();
        await page.keyboard.press('n');
        await page.getByRole('combobox', { name: 'Find' }).fill(words);
        await page.keyboard.press('Enter');
        await page.getByRole('combobox', { name: 'Find' }).waitFor({ state: 'detached' });
      };
      await add('length');
      await add('point');
      expect(await page.locator('sk-slip').count()).toBe(2);
      await add('chord');
      const chord = page.locator('sk-slip').nth(2);
      const from = chord.getByRole('button', { name: 'link a point' }).first();
      await from.focus();
      await page.keyboard.press('Enter');
      await page.getByRole('combobox', { name: 'Find' }).waitFor();
      await page.keyboard.press('Enter');
      await chord.getByRole('button', { name: 'Point', exact: true }).waitFor();
      expect(await page.locator('sk-board path.link').count()).toBe(1);
      expect(await page.getByRole('button', { name: /queries|query/ }).textContent()).toContain('1 query');
    }),
  );

  it(
    'links by dragging from port to port, to a port that fits alone',
    inWindow(async (page) => {
      await page.getByRole('button', { name: 'New', exact: true }).click();
      for (const words of ['length', 'point', 'force']) {
        await page.getByLabel('Board', { exact: true }).focus();
        await page.keyboard.press('n');
        await page.getByRole('combobox', { name: 'Find' }).fill(words);
        await page.keyboard.press('Enter');
        await page.getByRole('combobox', { name: 'Find' }).waitFor({ state: 'detached' });
        await page.keyboard.press('Escape');
      }
      const [length, point, force] = [0, 1, 2].map((i) => page.locator('sk-slip').nth(i));
      if (length === undefined || point === undefined || force === undefined) throw new Error('no slips');
      await drag(page, point.locator('header'), 330, 20);
      await drag(page, force.locator('header'), -60, 150);
      const up = point.locator('[data-side="input"][data-name="up"]');
      await dragTo(page, force.locator('[data-side="output"]').first(), up);
      expect(await page.locator('sk-board path.link').count()).toBe(0);
      await dragTo(page, length.locator('[data-side="output"]').first(), up);
      expect(await page.locator('sk-board path.link').count()).toBe(1);
      expect(await point.locator('.row.output .figure').textContent()).toBe('0\u00a0m, 3.000\u00a0m');
      await page.getByRole('button', { name: 'Undo' }).click();
      expect(await page.locator('sk-board path.link').count()).toBe(0);
    }),
  );

  it(
    'copies nodes with their links as text, also into another window, and takes them off again',
    inWindow(
      async (page) => {
        const slips = page.locator('sk-slip');
        const before = await slips.count();
        await page.getByRole('button', { name: 'Find', exact: true }).click();
        await page.getByRole('combobox', { name: 'Find' }).fill('left rafter');
        await page.keyboard.press('Enter');
        await page.keyboard.press('Control+c');
        await page.keyboard.press('Control+v');
        expect(await slips.count()).toBe(before + 1);
        const copy = page.locator('sk-slip[selected]');
        expect(await copy.locator('header input').inputValue()).toBe('Left rafter');
        expect(await copy.getByRole('button', { name: 'Left knee' }).count()).toBe(1);
        await page.keyboard.press('Delete');
        expect(await slips.count()).toBe(before);
        const other = await editor.openIn(page.context());
        await other.getByRole('button', { name: 'New', exact: true }).click();
        await other.getByLabel('Board', { exact: true }).focus();
        await other.keyboard.press('Control+v');
        expect(await other.locator('sk-slip header input').inputValue()).toBe('Left rafter');
        await other.close();
      },
      { permissions: ['clipboard-read', 'clipboard-write'] },
    ),
  );

  it(
    'selects by a rubber band and along links, puts nodes into their bands, and takes that back',
    inWindow(async (page) => {
      const board = await page.locator('sk-board').boundingBox();
      if (board === null) throw new Error('no board');
      await page.keyboard.down('Shift');
      await page.mouse.move(board.x + 230, board.y + 60);
      await page.mouse.down();
      await page.mouse.move(board.x + 360, board.y + 250);
      await page.mouse.up();
      await page.keyboard.up('Shift');
      const selected = page.locator('sk-slip[selected]');
      const some = await selected.count();
      expect(some).toBeGreaterThan(2);
      await page.getByRole('button', { name: 'Downstream' }).click();
      expect(await selected.count()).toBeGreaterThan(some);
      await page.keyboard.press('Escape');
      const place = () => page.locator('sk-slip').nth(20).boundingBox();
      const before = await place();
      await page.getByRole('button', { name: 'Tidy' }).click();
      await page.waitForTimeout(200);
      expect(await place()).not.toEqual(before);
      await page.getByRole('button', { name: 'Undo' }).click();
      await page.getByRole('button', { name: 'Show all' }).last().click();
      await page.waitForTimeout(200);
      const after = await place();
      expect(Math.abs((after?.x ?? 0) - (before?.x ?? 0))).toBeLessThan(2);
    }),
  );

  it(
    'saves what the command line reads to the same figures',
    inWindow(async (page) => {
      await page.getByLabel('Span, exact', { exact: true }).fill('80 ft');
      await page.getByLabel('Span, exact', { exact: true }).press('Enter');
      await page.evaluate(() => {
        (globalThis as { showSaveFilePicker?: unknown }).showSaveFilePicker = undefined;
      });
      const text = await savedText(page);
      expect(JSON.parse(text).nodes.find(({ id }: { id: string }) => id === 'span').values.value).toBe(
        '80 ft',
      );
      const lines = byCommandLine(text);
      for (const [name, id] of [
        ['Left knee moment', 'left-knee-moment'],
        ['Right knee moment', 'right-knee-moment'],
        ['Thrust', 'thrust'],
      ] as const) {
        expect(await readingOn(page, id)).toBe(lines[name]);
      }
    }),
  );

  it(
    'has after a reload what it had before, though the page was killed in the middle of a drag',
    inWindow(async (page) => {
      await page.getByLabel('Span, exact', { exact: true }).fill('30 m');
      await page.getByLabel('Span, exact', { exact: true }).press('Enter');
      const before = await readingOn(page, 'left-knee-moment');
      await page.waitForTimeout(300);
      const slider = page.getByRole('slider', { name: 'Rise of the crown' });
      const box = await slider.boundingBox();
      if (box === null) throw new Error('no slider');
      await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
      await page.mouse.down();
      await page.mouse.move(box.x + box.width / 3, box.y + box.height / 2);
      await page.reload();
      await page.locator('sk-slip').first().waitFor();
      expect(await page.getByLabel('Span, exact', { exact: true }).inputValue()).toBe('30 m');
      const rise = await page.getByLabel('Rise of the crown, exact', { exact: true }).inputValue();
      if (rise === '9.5 m') expect(await readingOn(page, 'left-knee-moment')).toBe(before);
    }),
  );

  it('keeps the work of two windows apart', async () => {
    const first = await editor.open();
    await first.getByLabel('Span, exact', { exact: true }).fill('28 m');
    await first.getByLabel('Span, exact', { exact: true }).press('Enter');
    const second = await editor.openIn(first.context());
    expect(await second.getByLabel('Span, exact', { exact: true }).inputValue()).toBe('24 m');
    await second.getByLabel('Span, exact', { exact: true }).fill('20 m');
    await second.getByLabel('Span, exact', { exact: true }).press('Enter');
    await first.waitForTimeout(300);
    await first.reload();
    await first.locator('sk-slip').first().waitFor();
    expect(await first.getByLabel('Span, exact', { exact: true }).inputValue()).toBe('28 m');
    await second.close();
    await first.close();
  });

  it(
    'works without a network once it was open, the hall and the ready graphs too',
    inWindow(async (page) => {
      await page.evaluate(async () => {
        await navigator.serviceWorker.ready;
      });
      await page.context().setOffline(true);
      await page.reload();
      await page.getByRole('img', { name: 'Hall of 8 bays' }).waitFor();
      await page.getByLabel('Ready graphs').selectOption('stand-roof');
      await page.getByRole('img', { name: 'Hall of 9 bays' }).waitFor();
      expect(await readingOn(page, 'lower-knee-moment')).toBe('−280.8 kN·m');
    }),
  );

  it(
    'prints figures in US customary units throughout, and in SI again',
    inWindow(async (page) => {
      await page.getByLabel('Units').selectOption('US');
      expect(await readingOn(page, 'thrust')).toBe('14.05 kip');
      expect(await page.locator('sk-elevation .dimension-text').first().textContent()).toBe('78.74\u00a0ft');
      await page.getByLabel('Units').selectOption('SI');
      expect(await readingOn(page, 'thrust')).toBe('62.49 kN');
    }),
  );

  it(
    'refuses a file that is no graph in words, and keeps the one that is open',
    inWindow(async (page) => {
      await page.evaluate(() => {
        const data = new DataTransfer();
        data.items.add(new File(['{"format":"drawing"}'], 'x.json'));
        document
          .querySelector('sk-app')
          ?.dispatchEvent(new DragEvent('drop', { dataTransfer: data, bubbles: true }));
      });
      const alert = page.getByRole('alert');
      expect(await alert.textContent()).toContain("This file can't be opened: the file is no graph");
      expect(await page.getByLabel('Title of the graph').inputValue()).toBe('Market hall');
    }),
  );

  it.each([
    ['light', 1280, 800],
    ['dark', 1280, 800],
    ['light', 820, 1180],
  ] as const)('has nothing serious against it by axe, %s at %d × %d', (colorScheme, width, height) =>
    inWindow(
      async (page) => {
        await page.getByRole('button', { name: 'No queries' }).click();
        await page.evaluate(AxeBuilder.source);
        const { violations } = await page.evaluate(() =>
          (globalThis as unknown as { axe: typeof AxeBuilder }).axe.run(document, {
            resultTypes: ['violations'],
          }),
        );
        const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
        expect(serious.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
      },
      { colorScheme, viewport: { width, height } },
    )(),
  );
});

type Spot = ReturnType<Page['locator']>;

async function middle(spot: Spot): Promise<readonly [number, number]> {
  const box = await spot.boundingBox();
  if (box === null) throw new Error('it is not on the screen');
  return [box.x + box.width / 2, box.y + box.height / 2];
}

async function drag(page: Page, spot: Spot, dx: number, dy: number): Promise<void> {
  const [x, y] = await middle(spot);
  // Beside the name's field, which is for typing.
  const box = await spot.boundingBox();
  const left = (box?.x ?? x) + 4;
  await page.mouse.move(left, y);
  await page.mouse.down();
  await page.mouse.move(left + dx / 2, y + dy / 2);
  await page.mouse.move(left + dx, y + dy);
  await page.mouse.up();
}

async function dragTo(page: Page, from: Spot, to: Spot): Promise<void> {
  await page.mouse.move(...(await middle(from)));
  await page.mouse.down();
  const [x, y] = await middle(to);
  await page.mouse.move(x - 30, y);
  await page.mouse.move(x, y);
  await page.mouse.up();
}
