import type { InternalApi } from 'nitropack/types'

/** Addresses of the API by their pattern, such as `/api/cards/:cardId`. */
export type ApiAddress = Extract<keyof InternalApi, `/api/${string}`>

/** Names of what an address leaves open. */
type Open<Address extends string>
  = Address extends `${string}:${infer Name}/${infer Rest}` ? Name | Open<Rest> : Address extends `${string}:${infer Name}` ? Name : never

/** Methods an address answers to, as HTTP writes them. */
type MethodOf<Address extends ApiAddress> = Uppercase<Extract<keyof InternalApi[Address], string>>

/** What an address answers to a method. */
export type ApiAnswer<Address extends ApiAddress, Method extends string> = InternalApi[Address][Lowercase<Method> & keyof InternalApi[Address]]

/** What goes along with a request. What the address leaves open is in `params`. */
export type ApiRequest<Address extends ApiAddress, Method extends string> = {
  method?: Method
  query?: Record<string, unknown>
  body?: unknown
  headers?: Record<string, string>
  timeout?: number
  retry?: number | false
  signal?: AbortSignal
} & ([Open<Address>] extends [never] ? { params?: undefined } : { params: Record<Open<Address>, string | number> })

/** Asks the API. The address is written as the server's folders name it, so that the compiler knows the answer without comparing every route. */
export type Api = <Address extends ApiAddress, Method extends MethodOf<Address> = 'GET' & MethodOf<Address>>(
  address: Address,
  ...request: [Open<Address>] extends [never] ? [request?: ApiRequest<Address, Method>] : [request: ApiRequest<Address, Method>]
) => Promise<ApiAnswer<Address, Method>>

/** Fills in what an address leaves open. */
export function apiPath(address: string, params: Readonly<Record<string, string | number>> = {}): string {
  return address.replace(/:(\w+)/g, (_, name: string) => {
    const value = params[name]
    if (value === undefined) throw new RangeError(`${address} needs ${name}`)
    return encodeURIComponent(value)
  })
}

/** The API by a way of fetching. */
export function apiBy(fetch: (path: string, options: object) => Promise<unknown>): Api {
  // The answer's type is what the route returns: Nitro takes it from the handler itself.
  return ((address: string, { params, ...options }: { params?: Record<string, string | number> } = {}) => fetch(apiPath(address, params), options)) as Api
}

/** Asks the API from the page. */
export const api: Api = apiBy((path, options) => $fetch<unknown>(path, options))

/** Asks the API with the visitor's own cookie, also while a page is drawn on the server. */
export function useApi(): Api {
  const request = useRequestFetch()
  return apiBy((path, options) => request<unknown>(path, options))
}
