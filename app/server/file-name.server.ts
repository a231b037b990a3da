/** Words as a file name that every system takes: small letters, digits and hyphens. */
function fileWords(text: string): string {
  const plain = text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase()
  return (
    plain
      .replace(/[^a-z0-9]+/g, '-')
      .replace(/^-+|-+$/g, '')
      .slice(0, 60) || 'untitled'
  )
}

/** The header that makes a download of a response: its name says what is inside. */
export const attachment = (parts: readonly string[], ending: string): string =>
  `attachment; filename="${parts.map(fileWords).join('-')}.${ending}"`
