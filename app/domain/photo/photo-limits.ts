/** Stated maxima of photos: photos of a job, and megabytes of one when it is sent. */
export const mostPhotos = 40
export const mostMegabytes = 15
