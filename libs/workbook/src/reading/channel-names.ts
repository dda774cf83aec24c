import type { ChannelContext } from '../types';
import { foldName } from './names';

const NONE: ReadonlySet<number> = new Set();

/** Finds channels by name, by alias, or by both written together. */
export class ChannelNames {
  private readonly ids = new Map<string, Set<number>>();
  /** Answers by the text as asked, since rows repeat themselves. */
  private readonly asked = new Map<string, ReadonlySet<number>>();
  private readonly byId: Map<number, ChannelContext>;

  constructor(channels: readonly ChannelContext[]) {
    this.byId = new Map(channels.map((channel) => [channel.id, channel]));
    const names = new Set<string>();
    for (const { id, name, aliases } of channels) {
      names.add(foldName(name));
      this.ids.set(foldName(name), new Set([id]));
      for (const alias of aliases) {
        this.register(`${name}${alias}`, id);
        this.register(`${alias}${name}`, id);
      }
    }
    for (const { id, aliases } of channels) {
      for (const alias of aliases) if (!names.has(foldName(alias))) this.register(alias, id);
    }
  }

  /** Channels that a text may mean: none, one, or several that share an alias. */
  find(text: string): ReadonlySet<number> {
    const known = this.asked.get(text);
    if (known) return known;
    const found = this.ids.get(foldName(text)) ?? NONE;
    if (this.asked.size < 1_000) this.asked.set(text, found);
    return found;
  }

  /**
   * Channels that a longer text names with some of its words ("BG-201 night", "Coat weight, week 2"): those of its longest
   * name that are known here.
   */
  findWithin(text: string): ReadonlySet<number> {
    const words = text
      .split(/[\s,;:()[\]/|]+/)
      .filter(Boolean)
      .slice(0, 12);
    for (let length = Math.min(words.length, 6); length > 0; length -= 1) {
      const found = new Set<number>();
      for (let from = 0; from + length <= words.length; from += 1) {
        for (const id of this.find(words.slice(from, from + length).join(' '))) found.add(id);
      }
      if (found.size > 0) return found;
    }
    return NONE;
  }

  has(id: number | undefined): boolean {
    return id !== undefined && this.byId.has(id);
  }

  all(): ChannelContext[] {
    return [...this.byId.values()];
  }

  /** The only channel that a text may mean. */
  findOne(text: string): ChannelContext | undefined {
    const found = this.find(text);
    return found.size === 1 ? this.get([...found][0]) : undefined;
  }

  get(id: number): ChannelContext {
    return this.byId.get(id)!;
  }

  /** The line's channel when it has just one. */
  only(): ChannelContext | undefined {
    return this.byId.size === 1 ? [...this.byId.values()][0] : undefined;
  }

  list(): string {
    return [...this.byId.values()].map((channel) => `"${channel.name}"`).join(', ') || 'none';
  }

  private register(text: string, id: number): void {
    const key = foldName(text);
    if (key === '') return;
    this.ids.set(key, (this.ids.get(key) ?? new Set<number>()).add(id));
  }
}
