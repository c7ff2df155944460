/** Sum of a stream's component flows [mol/s]. */
export function totalOf(n_mol_s: Float64Array): number {
  let total = 0;
  for (const n of n_mol_s) total += n;
  return total;
}
