import { existsSync } from 'node:fs';
import { type Browser, chromium } from 'playwright-core';

const INSTALLED = [
  '/usr/bin/google-chrome',
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  'C:/Program Files/Google/Chrome/Application/chrome.exe',
];

/** Software WebGL, and no talk to the world: the tests need no graphics card and no network. */
const FLAGS = [
  '--no-sandbox',
  '--use-gl=angle',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
  '--ignore-gpu-blocklist',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--no-first-run',
];

/** Starts Chromium: the one that `CHROME_PATH` names, an installed one, or the one that an npm package ships. */
export async function startChromium(): Promise<Browser> {
  const named = process.env.CHROME_PATH;
  const executablePath =
    named !== undefined && named !== ''
      ? named
      : (INSTALLED.find((path) => existsSync(path)) ?? (await shippedChromium()));
  return chromium.launch({ executablePath, args: FLAGS });
}

/** The packaged Chromium, with the shared libraries and fonts that a bare machine may lack. */
async function shippedChromium(): Promise<string> {
  // The package unpacks those libraries only where it takes the machine for the kind it was made for.
  process.env.AWS_EXECUTION_ENV ??= 'AWS_Lambda_nodejs20.x';
  const { default: shipped } = await import('@sparticuz/chromium');
  return shipped.executablePath();
}
