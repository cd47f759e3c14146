import { cpus } from 'node:os';
import { engine } from './engine.ts';

console.log(`Node ${process.version}, ${cpus().length} cores. Ratios within this run are what counts.\n`);
engine();
