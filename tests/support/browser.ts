import { type Browser, chromium as playwright } from 'playwright-core';
import { chromium } from '@/lib/server/commands/local/debian.mjs';

/** A headless Chromium; close it in `afterAll`. */
export function openBrowser(): Promise<Browser> {
  const isRoot = process.getuid?.() === 0;
  return playwright.launch({ executablePath: chromium(), args: isRoot ? ['--no-sandbox'] : [] });
}
