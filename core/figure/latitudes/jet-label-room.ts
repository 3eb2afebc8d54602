/** Right of the picture: where the labels' parts stand, in pixels from the frame. */
export function jetLabelRoom(small: number): { leader: number; triangle: number; text: number } {
  const leader = Math.round(0.9 * small);
  const triangle = Math.round(0.62 * small);
  return { leader, triangle, text: 3 + leader + triangle + Math.round(0.4 * small) };
}
