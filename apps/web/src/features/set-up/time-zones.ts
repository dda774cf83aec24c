let known: readonly string[] | null = null;

/** The zones that this browser knows, for a field to offer; the server judges what is typed. */
export function timeZones(): readonly string[] {
  known ??= typeof Intl.supportedValuesOf === 'function' ? Intl.supportedValuesOf('timeZone') : [];
  return known;
}

/** The zone that this computer is set to. */
export const ownTimeZone = (): string => Intl.DateTimeFormat().resolvedOptions().timeZone;
