import type { LineContext } from '../types';
import { foldName } from './names';

/** Finds products by code or name. */
export class ProductNames {
  private readonly codes = new Map<string, string>();
  private readonly found = new Map<string, string | undefined>();

  constructor(private readonly products: LineContext['products']) {
    for (const { code, name } of products) {
      if (!this.codes.has(foldName(name))) this.codes.set(foldName(name), code);
    }
    for (const { code } of products) this.codes.set(foldName(code), code);
  }

  /** The product's code, or undefined when none has that code or name. */
  find(text: string): string | undefined {
    if (!this.found.has(text) && this.found.size < 1_000) this.found.set(text, this.codes.get(foldName(text)));
    return this.found.get(text) ?? this.codes.get(foldName(text));
  }

  list(): string {
    return this.products.map((product) => `"${product.code}"`).join(', ') || 'none';
  }
}
