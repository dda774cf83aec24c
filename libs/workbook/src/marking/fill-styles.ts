import { insertBeforeEnd, prefixOf, setAttribute } from './xml-edit';

export type Shade = 'not-used' | 'notice';

const COLOURS: Record<Shade, string> = { 'not-used': 'FFF3D3C4', notice: 'FFF6EBC8' };
const SHADES: Shade[] = ['not-used', 'notice'];

/** Adds to a workbook's styles, for each style that is asked for, the same with a fill. */
export class FillStyles {
  private readonly xml: string;
  private readonly prefix: string;
  private readonly styles: string[];
  private readonly firstFill: number;
  private readonly made = new Map<string, number>();

  /** Null for a part without cell styles: then there are comments alone. */
  static from(xml: string): FillStyles | null {
    return /<(?:\w+:)?cellXfs[^>]*[^/]>/.test(xml) ? new FillStyles(xml) : null;
  }

  private constructor(xml: string) {
    this.prefix = prefixOf(xml, 'styleSheet');
    const p = this.prefix;
    const withFills = new RegExp(`<${p}fills[\\s>]`).test(xml)
      ? xml
      : xml.replace(
          new RegExp(`<${p}(borders|cellStyleXfs|cellXfs)[\\s>]`),
          (tag) => `<${p}fills>${this.fill('none')}${this.fill('gray125')}</${p}fills>${tag}`,
        );
    const fills = new RegExp(`<${p}fills[\\s>][\\s\\S]*?</${p}fills>`).exec(withFills)?.[0] ?? '';
    this.firstFill = fills.match(new RegExp(`<${p}fill[\\s/>]`, 'g'))?.length ?? 0;
    const added = SHADES.map((shade) => this.fill('solid', COLOURS[shade])).join('');
    this.xml = insertBeforeEnd(withFills, 'fills', added).replace(new RegExp(`<${p}fills\\s[^>]*>`), `<${p}fills>`);
    const list = new RegExp(`<${p}cellXfs[^>]*>([\\s\\S]*?)</${p}cellXfs>`).exec(this.xml);
    if (!list) throw new Error('no cell styles');
    this.styles = list[1].match(new RegExp(`<${p}xf\\s[^>]*?/>|<${p}xf\\s[\\s\\S]*?</${p}xf>|<${p}xf/>`, 'g')) ?? [];
  }

  /** Index of the style like `base` with the shade. */
  styleFor(base: number, shade: Shade): number {
    const key = `${base} ${shade}`;
    const known = this.made.get(key);
    if (known !== undefined) return known;
    const p = this.prefix;
    const like = this.styles[base] ?? this.styles[0] ?? `<${p}xf numFmtId="0"/>`;
    const shaded = like.replace(new RegExp(`^<${p}xf([^>]*)>`), (_, inside: string) => {
      const withFill = setAttribute(inside, 'fillId', this.firstFill + SHADES.indexOf(shade));
      return `<${p}xf${setAttribute(withFill, 'applyFill', 1)}>`;
    });
    this.made.set(key, this.styles.push(shaded) - 1);
    return this.styles.length - 1;
  }

  toXml(): string {
    const p = this.prefix;
    return this.xml.replace(
      new RegExp(`<${p}cellXfs[^>]*>[\\s\\S]*?</${p}cellXfs>`),
      () => `<${p}cellXfs count="${this.styles.length}">${this.styles.join('')}</${p}cellXfs>`,
    );
  }

  private fill(pattern: string, colour?: string): string {
    const p = this.prefix;
    const inside = colour ? `<${p}fgColor rgb="${colour}"/><${p}bgColor indexed="64"/>` : '';
    return `<${p}fill><${p}patternFill patternType="${pattern}">${inside}</${p}patternFill></${p}fill>`;
  }
}
