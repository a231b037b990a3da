const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** "1 Dec 2026" by the server's clock. */
export const dayInWords = (day: Date): string => `${day.getDate()} ${months[day.getMonth()]} ${day.getFullYear()}`
