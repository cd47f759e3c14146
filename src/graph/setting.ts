import { type Measure, QuantityError, readMeasure } from '../quantity/index.ts';
import { Refusal } from '../tape/index.ts';

/** How a setting is shown and what it may be. */
export type SettingForm =
  | { readonly form: 'choice'; readonly options: Readonly<Record<string, string>> }
  | { readonly form: 'text'; readonly most: number }
  | { readonly form: 'flag' }
  | { readonly form: 'quantity'; readonly measure: Measure };

/** A discrete choice of a node: never driven by a link. Changing one traces the graph again. */
export interface SettingSpec<T> {
  readonly title: string;
  readonly form: SettingForm;
  /** As it is written in a file. Undefined where nothing need be said. */
  readonly default: string | boolean | undefined;
  /** The value of what is written. @throws Refusal with what may be written. */
  read(written: unknown): T;
}

/** One of several named options; `options` maps what is written to what is shown. */
export function choice<const O extends Record<string, string>>(
  title: string,
  options: O,
  initial: keyof O & string,
): SettingSpec<keyof O & string> {
  return {
    title,
    form: { form: 'choice', options },
    default: initial,
    read(written) {
      if (typeof written === 'string' && Object.hasOwn(options, written)) return written;
      const known = Object.keys(options).join(', ');
      throw new Refusal('setting', `setting "${title}" is ${show(written)}, but must be one of ${known}`);
    },
  };
}

/** A text of at most `most` signs. */
export function text(title: string, initial: string, most = 200): SettingSpec<string> {
  return {
    title,
    form: { form: 'text', most },
    default: initial,
    read(written) {
      if (typeof written !== 'string') {
        throw new Refusal('setting', `setting "${title}" is ${show(written)}, but must be a text`);
      }
      if (written.length > most) {
        throw new Refusal(
          'setting',
          `setting "${title}" has ${written.length} signs, more than the ${most} that are read: shorten it`,
        );
      }
      return written;
    },
  };
}

/** Yes or no. */
export function flag(title: string, initial: boolean): SettingSpec<boolean> {
  return {
    title,
    form: { form: 'flag' },
    default: initial,
    read(written) {
      if (typeof written === 'boolean') return written;
      throw new Refusal('setting', `setting "${title}" is ${show(written)}, but must be true or false`);
    },
  };
}

/** A quantity that need not be given: its value in SI units, or undefined. */
export function optionalQuantity(title: string, measure: Measure): SettingSpec<number | undefined> {
  return {
    title,
    form: { form: 'quantity', measure },
    default: undefined,
    read(written) {
      if (written === undefined || written === '') return undefined;
      if (typeof written !== 'string') {
        throw new Refusal('setting', `setting "${title}" is ${show(written)}, but must be ${measure.called}`);
      }
      try {
        return readMeasure(written, measure).value;
      } catch (error) {
        if (error instanceof QuantityError)
          throw new Refusal('setting', `setting "${title}": ${error.message}`);
        throw error;
      }
    },
  };
}

function show(written: unknown): string {
  const shown = JSON.stringify(written) ?? 'missing';
  return shown.length <= 40 ? shown : `${shown.slice(0, 39)}…`;
}
