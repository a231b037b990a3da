/** The most heaters of one variant. */
export const maxHeaters = 200
