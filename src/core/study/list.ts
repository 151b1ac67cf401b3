/** Items in their order: an array, or what makes each item when it is asked for. */
export interface List<T> extends Iterable<T> {
  readonly length: number;
  at(index: number): T | undefined;
}
