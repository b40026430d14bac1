/** A Chromium for journeys: one for all pages of a test file. */
import { existsSync } from 'node:fs';
import { chromium, type Browser, type Page } from 'playwright-core';
import { emailOf, testPassword, type OfficeKey } from '../setup/people';
import type { PersonRole } from '@/lib/access/may';

const places = [process.env.CHROMIUM, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];
const quiet = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking'];

export function openBrowser(): Promise<Browser> {
  const executablePath = places.find((place) => place !== undefined && existsSync(place));
  if (executablePath === undefined)
    throw new Error('There is no Chromium. Install it (apt-get install chromium) or name it in CHROMIUM.');
  return chromium.launch({ executablePath, args: [...quiet, '--disable-component-update', '--disable-sync'] });
}

/** What a page complained of in its console; a journey ends with none. */
export function complaintsOf(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => {
    // Chromium asks for this by itself where a page is left before its own icon is read
    if (message.location().url.endsWith('/favicon.ico')) return;
    if (message.type() === 'error') complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(String(error)));
  return complaints;
}

export async function signInAs(page: Page, url: string, office: OfficeKey, role: PersonRole): Promise<void> {
  await page.goto(`${url}/sign-in`);
  await page.getByLabel('E-mail').fill(emailOf(office, role));
  await page.getByLabel('Password').fill(testPassword);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((to) => !to.pathname.startsWith('/sign-in'));
}
