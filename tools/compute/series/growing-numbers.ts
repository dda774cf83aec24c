/** A Float64Array that grows. */
export class GrowingNumbers {
  private buffer = new Float64Array(1024);
  length = 0;

  push(value: number): void {
    if (this.length === this.buffer.length) {
      const larger = new Float64Array(2 * this.length);
      larger.set(this.buffer);
      this.buffer = larger;
    }
    this.buffer[this.length++] = value;
  }

  toArray(): Float64Array {
    return this.buffer.slice(0, this.length);
  }
}
