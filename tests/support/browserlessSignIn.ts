/** Follows redirects between the application and the provider by hand, as a browser would. */
type Jar = Map<string, string>

async function send(jar: Jar, url: string, form?: Record<string, string>): Promise<Response> {
  const response = await fetch(url, {
    redirect: 'manual',
    headers: { cookie: [...jar].map(([name, value]) => `${name}=${value}`).join('; ') },
    ...(form ? { method: 'POST', body: new URLSearchParams(form) } : {}),
  })
  for (const cookie of response.headers.getSetCookie()) {
    const [, name, value] = /^([^=]+)=([^;]*)/.exec(cookie) as unknown as [string, string, string]
    jar.set(name, value)
  }
  return response
}

/**
 * Signs in at the stand-in provider without a browser.
 * @param authorisationUrl where the application sends the browser
 * @param account subject of one of the invented people
 * @param jar cookies that the "browser" holds at the provider; pass one to stay signed in there
 * @returns the address, of the application, that the provider sends the browser back to
 */
export async function signInAtProvider(
  authorisationUrl: string,
  account: string,
  jar: Jar = new Map(),
): Promise<URL> {
  const { origin } = new URL(authorisationUrl)
  let here = authorisationUrl
  let form: Record<string, string> | undefined
  for (let hop = 0; hop < 10; hop += 1) {
    const response = await send(jar, here, form)
    const next = response.headers.get('location')
    if (next) {
      const address = new URL(next, here)
      if (address.origin !== origin) return address
      here = address.href
      form = here.includes('/interaction/') ? { account } : undefined
    } else {
      const body = await response.text()
      form = selfSendingForm(body)
      here = /action="([^"]+)"/.exec(body)?.[1] ?? here
      if (!form) throw new Error(`${here} answered ${response.status}: ${body}`)
    }
  }
  throw new Error(`The provider kept on redirecting; last to ${here}.`)
}

/** The fields of a page that sends itself on, as the provider uses when the account changes. */
function selfSendingForm(body: string): Record<string, string> | undefined {
  if (!body.includes('document.forms[0].submit()')) return undefined
  const fields = body.matchAll(/<input type="hidden" name="([^"]+)" value="([^"]*)"/g)
  return Object.fromEntries([...fields].map(([, name, value]) => [name!, value!]))
}
