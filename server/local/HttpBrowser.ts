type Jar = Map<string, string>

export type Answer = {
  status: number
  location: string
  // biome-ignore lint/suspicious/noExplicitAny: the answer of whatever route was asked
  body: any
}

/**
 * A browser without a screen: keeps cookies, walks redirects between the product and the stand-in
 * identity provider, and sends what our own pages send. For the demonstration and for tests.
 */
export class HttpBrowser {
  /** Every Set-Cookie line that the product sent. */
  readonly setCookies: string[] = []
  readonly #product: string
  readonly #own: Jar = new Map()
  readonly #providers: Jar = new Map()

  /** @param product address of the product, as the browser sees it, without a slash at its end */
  constructor(product: string) {
    this.#product = product
  }

  cookie(name: string): string | undefined {
    return this.#own.get(name)
  }

  cookies(): ReadonlyMap<string, string> {
    return new Map(this.#own)
  }

  take(cookies: ReadonlyMap<string, string>): void {
    for (const [name, value] of cookies) this.#own.set(name, value)
  }

  get(path: string): Promise<Answer> {
    return this.send('GET', path)
  }

  post(path: string, body: object = {}): Promise<Answer> {
    return this.send('POST', path, { 'x-breathmark': '1' }, body)
  }

  /** One request with just these headers beside the cookies. */
  async send(
    method: string,
    path: string,
    headers: Record<string, string> = {},
    body?: object | FormData,
  ): Promise<Answer> {
    const json = body && !(body instanceof FormData)
    const response = await fetch(this.#product + path, {
      method,
      redirect: 'manual',
      headers: {
        cookie: line(this.#own),
        ...(json ? { 'content-type': 'application/json' } : {}),
        ...headers,
      },
      ...(body ? { body: json ? JSON.stringify(body) : body } : {}),
    })
    this.#keep(this.#own, response)
    const text = await response.text()
    const isJson = response.headers.get('content-type')?.includes('json')
    return {
      status: response.status,
      location: (response.headers.get('location') ?? '').replace(this.#product, ''),
      body: isJson ? JSON.parse(text) : text,
    }
  }

  /** Signs in as an account of the stand-in. @returns the path on which the product lets the browser land */
  async signIn(subject: string, returnTo = '/'): Promise<string> {
    return this.#land(`/auth/login?returnTo=${encodeURIComponent(returnTo)}`, subject)
  }

  /** Authenticates again for a signature. @returns the path on which the product lets the browser land */
  async signAgain(subject: string, purpose: string, returnTo = '/'): Promise<string> {
    const query = new URLSearchParams({ purpose, returnTo })
    return this.#land(`/auth/sign?${query}`, subject)
  }

  /** Signs in at the provider and stops before its answer reaches the product. @returns that answer's path */
  async signInUpToCallback(subject: string, path = '/auth/login'): Promise<string> {
    let url = (await this.get(path)).location
    for (let steps = 0; steps < 10; steps++) {
      if (url.startsWith('/auth/callback')) return url
      url = await this.#providerStep(url, subject)
      if (url.startsWith(this.#product)) url = url.slice(this.#product.length)
    }
    throw new Error('The provider sends the browser round in circles.')
  }

  async #land(path: string, subject: string): Promise<string> {
    return (await this.get(await this.signInUpToCallback(subject, path))).location
  }

  /** Follows a redirect of the provider, or chooses the account on its page. */
  async #providerStep(url: string, subject: string): Promise<string> {
    const page = await this.#atProvider(url)
    const next = page.headers.get('location')
    if (next) return new URL(next, url).href
    const chosen = await this.#atProvider(url, new URLSearchParams({ account: subject }))
    return new URL(chosen.headers.get('location') ?? '', url).href
  }

  async #atProvider(url: string, form?: URLSearchParams): Promise<Response> {
    const response = await fetch(url, {
      redirect: 'manual',
      headers: { cookie: line(this.#providers) },
      ...(form ? { method: 'POST', body: form } : {}),
    })
    this.#keep(this.#providers, response)
    return response
  }

  #keep(jar: Jar, response: Response): void {
    for (const cookie of response.headers.getSetCookie()) {
      if (jar === this.#own) this.setCookies.push(cookie)
      const [pair = '', ...attributes] = cookie.split(';')
      const at = pair.indexOf('=')
      if (attributes.some((each) => /expires=Thu, 01 Jan 1970/i.test(each)))
        jar.delete(pair.slice(0, at))
      else jar.set(pair.slice(0, at), pair.slice(at + 1))
    }
  }
}

const line = (jar: Jar): string => [...jar].map(([name, value]) => `${name}=${value}`).join('; ')
