/** The fields of a submitted form. A body that is no form answers 400. */
export async function readForm(request: Request): Promise<FormData> {
  try {
    return await request.formData()
  } catch {
    throw new Response('The form cannot be read.', { status: 400, statusText: 'The form cannot be read.' })
  }
}
