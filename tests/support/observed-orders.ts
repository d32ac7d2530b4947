/** Orders seen between neighbours of a list of errors, the step halved from one to the next: log2 of their ratios. */
export function observedOrders(errors: readonly number[]): number[] {
  return errors.slice(1).map((error, i) => Math.log2(errors[i]! / error));
}
