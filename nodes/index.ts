import { Library } from '../src/graph/index.ts';
import { arch } from './arch/index.ts';
import { loads } from './loads/index.ts';
import { quantities } from './quantities/index.ts';
import { settingOut } from './setting-out/index.ts';
import { virtualWork } from './virtual-work/index.ts';

/** The packs that come with the program, in the order of the stock. */
export const builtInPacks = [quantities, settingOut, arch, loads, virtualWork] as const;

/** All built-in nodes. */
export const builtIn: Library = new Library(builtInPacks);
