/** The text fields of a posted form; none when the body is no form. The last of two with one name counts. */
export async function readFields(request: Request): Promise<Record<string, string>> {
  const form = await request.formData().catch(() => new FormData())
  const fields: Record<string, string> = {}
  for (const [name, value] of form) if (typeof value === 'string') fields[name] = value
  return fields
}
