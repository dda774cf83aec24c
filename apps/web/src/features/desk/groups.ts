import { DESK_GROUPS, type DeskGroup, type DeskItem } from '@app/contracts';

export const GROUP_WORDS: Record<DeskGroup, string> = {
  decide: 'Decide',
  fix: 'Fix',
  approve: 'Approve',
  check: 'Check',
  set_aside: 'Set aside',
};

/** The groups that hold anything, in the desk's order, each with its oldest first. */
export function groupsOf(items: readonly DeskItem[]): { group: DeskGroup; items: DeskItem[] }[] {
  return DESK_GROUPS.map((group) => ({
    group,
    items: items.filter((item) => item.group === group).sort((a, b) => Date.parse(a.since) - Date.parse(b.since)),
  })).filter(({ items: found }) => found.length > 0);
}

/** "Nothing waits", "1 thing waits", "4 things wait". */
export function countWords(count: number): string {
  if (count === 0) return 'Nothing waits for you';
  return count === 1 ? 'One thing waits for you' : `${count} things wait for you`;
}
