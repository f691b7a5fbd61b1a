/**
 * A page is sent when all of it has been made. A page that fails half way would otherwise go out as half a page with a
 * status that says all is well; this way it becomes the error page.
 * @param response what the framework answers; only HTML is waited for
 * @param onFault told why a page could not be made
 * @returns the same answer with its whole body, or an empty 500 that the framework turns into its error page
 */
export async function wholePage(response: Response, onFault: (error: unknown) => void): Promise<Response> {
  const { headers } = response;
  if (
    !response.body ||
    !headers.get('content-type')?.startsWith('text/html') ||
    headers.has('content-encoding')
  )
    return response;
  try {
    const body = await response.text();
    return new Response(body, response);
  } catch (error) {
    onFault(error);
    return new Response(null, { status: 500 });
  }
}
