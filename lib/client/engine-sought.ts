/** Widths and gaps that are looked through: from what can hardly be etched to what nobody routes [m]. */
export const SOUGHT = { min: 50e-6, max: 2.5e-3 } as const;
