/**
 * Place and value of the extreme of the parabola through (x[i-1], y[i-1]), (x[i], y[i]), (x[i+1], y[i+1]); the spacing may be
 * uneven and of either direction. The middle point itself where the three lie on a line or a neighbour is missing.
 */
export function parabolaVertex(x: ArrayLike<number>, y: ArrayLike<number>, i: number): { at: number; value: number } {
  const before = x[i] - x[i - 1];
  const after = x[i + 1] - x[i];
  const slopeBefore = (y[i] - y[i - 1]) / before;
  const slopeAfter = (y[i + 1] - y[i]) / after;
  const curvature = (slopeAfter - slopeBefore) / (before + after);
  if (!(Math.abs(curvature) > 0)) return { at: x[i], value: y[i] };
  const slope = (slopeBefore * after + slopeAfter * before) / (before + after);
  return { at: x[i] - slope / (2 * curvature), value: y[i] - (slope * slope) / (4 * curvature) };
}
