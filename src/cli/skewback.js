#!/usr/bin/env node
// The program is TypeScript; the loader lets Node run it as it stands, with nothing to build first.
import { register } from 'tsx/esm/api';

register();
// A reader that stops early (head, less) is no error.
process.stdout.on('error', ({ code }) => process.exit(code === 'EPIPE' ? 0 : 1));
const { main } = await import('./main.ts');
process.exitCode = main(process.argv.slice(2));
