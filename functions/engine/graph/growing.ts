/** A list of whole numbers in a typed array that grows. */
export class GrowingInts {
  length = 0;
  data = new Int32Array(1024);

  push(value: number): void {
    if (this.length === this.data.length) {
      const larger = new Int32Array(2 * this.length);
      larger.set(this.data);
      this.data = larger;
    }
    this.data[this.length++] = value;
  }
}

/** A list of numbers in a typed array that grows. */
export class GrowingNumbers {
  length = 0;
  data = new Float64Array(1024);

  push(value: number): void {
    if (this.length === this.data.length) {
      const larger = new Float64Array(2 * this.length);
      larger.set(this.data);
      this.data = larger;
    }
    this.data[this.length++] = value;
  }
}
