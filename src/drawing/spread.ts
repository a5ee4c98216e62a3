/**
 * Moves labels apart along a line: of all places at least `step` apart and in the wanted order, the nearest to the
 * wanted ones (least squares, by pooling neighbours), then moved as a whole between `low` and `high` where they fit.
 * `wanted` ascends. Returns the places in the same order.
 */
export function spread(wanted: readonly number[], step: number, low = -Infinity, high = Infinity): number[] {
  const pools: { sum: number; count: number }[] = [];
  wanted.forEach((place, i) => {
    let pool = { sum: place - i * step, count: 1 };
    let last = pools[pools.length - 1];
    while (last && last.sum / last.count >= pool.sum / pool.count) {
      pool = { sum: pool.sum + last.sum, count: pool.count + last.count };
      pools.pop();
      last = pools[pools.length - 1];
    }
    pools.push(pool);
  });
  const last = high - Math.max(0, wanted.length - 1) * step;
  const places: number[] = [];
  for (const pool of pools) {
    const place = Math.max(low, Math.min(last, pool.sum / pool.count));
    for (let k = 0; k < pool.count; k++) places.push(place + places.length * step);
  }
  return places;
}
