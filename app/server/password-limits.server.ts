/** Least and most characters of a password. */
export const passwordLimits = { least: 12, most: 128 } as const
