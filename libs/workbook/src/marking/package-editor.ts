import { posix } from 'node:path';
import { buffer } from 'node:stream/consumers';
import type { Archive } from '../container/archive';
import { escapeXml, insertBeforeEnd } from './xml-edit';
import { packPart, writeArchive } from './zip-bytes';

const PACKAGE = 'http://schemas.openxmlformats.org/package/2006';
const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';

export interface Relation {
  id: string;
  type: string;
  target: string;
}

const relationsPart = (owner: string): string =>
  posix.join(posix.dirname(owner), '_rels', `${posix.basename(owner)}.rels`);

/** A workbook's parts with some of them replaced; the others are carried over as they lie, still compressed. */
export class PackageEditor {
  private readonly changed = new Map<string, { name: string; text: string }>();

  constructor(private readonly archive: Archive) {}

  has(name: string): boolean {
    return this.changed.has(name.toLowerCase()) || this.archive.has(name);
  }

  async read(name: string): Promise<string> {
    const changed = this.changed.get(name.toLowerCase());
    return changed ? changed.text : (await buffer(this.archive.read(name))).toString('utf8');
  }

  write(name: string, text: string): void {
    this.changed.set(name.toLowerCase(), { name, text });
  }

  /** A part name that is not taken: `xl/comments1.xml`, `xl/comments2.xml`, … */
  freeName(before: string, after: string): string {
    let count = 1;
    while (this.has(`${before}${count}${after}`)) count += 1;
    return `${before}${count}${after}`;
  }

  async relations(owner: string): Promise<Relation[]> {
    const part = relationsPart(owner);
    if (!this.has(part)) return [];
    const text = await this.read(part);
    return [...text.matchAll(/<(?:\w+:)?Relationship\s([^>]*)>/g)].map(([, attributes]) => {
      const get = (name: string): string => new RegExp(`(?:^|\\s)${name}="([^"]*)"`).exec(attributes)?.[1] ?? '';
      const target = get('Target');
      return {
        id: get('Id'),
        type: get('Type').slice(get('Type').lastIndexOf('/') + 1),
        target: target.startsWith('/') ? target.slice(1) : posix.join(posix.dirname(owner), target),
      };
    });
  }

  /** @returns the new relation's id */
  async relate(owner: string, type: string, target: string): Promise<string> {
    const part = relationsPart(owner);
    const relative = posix.relative(posix.dirname(owner), target);
    const taken = new Set((await this.relations(owner)).map((relation) => relation.id));
    let count = taken.size + 1;
    while (taken.has(`rIdMark${count}`)) count += 1;
    const empty = `${HEAD}<Relationships xmlns="${PACKAGE}/relationships"></Relationships>`;
    const text = this.has(part) ? await this.read(part) : empty;
    const relation = `<Relationship Id="rIdMark${count}" Type="${OFFICE}/${type}" Target="${escapeXml(relative)}"/>`;
    this.write(part, insertBeforeEnd(text, 'Relationships', relation));
    return `rIdMark${count}`;
  }

  async declare(part: string, contentType: string): Promise<void> {
    const types = await this.read('[Content_Types].xml');
    const entry = `<Override PartName="/${escapeXml(part)}" ContentType="${contentType}"/>`;
    this.write('[Content_Types].xml', insertBeforeEnd(types, 'Types', entry));
  }

  async toBytes(): Promise<Buffer> {
    const kept = (await this.archive.packedParts()).filter((part) => !this.changed.has(part.name.toLowerCase()));
    return writeArchive([...[...this.changed.values()].map(({ name, text }) => packPart(name, text)), ...kept]);
  }
}
