/** The path without its query, and without what opens a link that was mailed. */
export const loggedPath = (url: string) =>
  url.split('?')[0].replace(/^(\/(?:api\/auth\/links|invitation|password)\/).+/, '$1…');
