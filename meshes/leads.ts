/** How near to each other and how far apart leads may stand. Any unit of length. */

/** A section's extent along the line that joins the leads, and its largest. */
interface LeadSection {
  readonly along: number;
  readonly across: number;
}

/** Part of spacing and width together that must be left between the leads: finer gaps the pair's grid cannot resolve. */
const FINEST_GAP = 1e-3;

/** The least spacing, centre to centre, at which leads of this section are solved. */
export function leastSpacing({ along, across }: LeadSection): number {
  return (along + FINEST_GAP * across) / (1 - FINEST_GAP);
}

/**
 * Leads further apart than so many of their widths are solved at that spacing: beyond it each is a thin line to the other, so
 * that R stays (to about 2(a/s)² = 1e-5, a the radius) and L grows by (μ0/π) ln of the ratio per length.
 */
export const FARTHEST = 200;
