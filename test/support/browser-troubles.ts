import type { BrowserContext } from 'playwright-core';

/**
 * Notes what went wrong in a browser without a page saying so: script errors, console errors and warnings, requests that failed or were
 * answered with 4xx or 5xx ("POST /api/auth/sign-in 401"). Requests that a page gives up as it is left are none.
 */
export function watchTroubles(context: BrowserContext, troubles: string[]): void {
  context.on('weberror', (error) => troubles.push(`script error: ${error.error().message}`));
  context.on('console', (message) => {
    const isAnswer = message.text().startsWith('Failed to load resource');
    if (['error', 'warning'].includes(message.type()) && !isAnswer) troubles.push(`console: ${message.text()}`);
  });
  context.on('requestfailed', (request) => {
    const why = request.failure()?.errorText ?? '';
    if (why !== 'net::ERR_ABORTED') troubles.push(`${request.method()} ${pathOf(request.url())} ${why}`);
  });
  context.on('response', (response) => {
    if (response.status() < 400) return;
    troubles.push(`${response.request().method()} ${pathOf(response.url())} ${response.status()}`);
  });
}

const pathOf = (url: string): string => new URL(url).pathname.replace(/\d+/g, '#');
