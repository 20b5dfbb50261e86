import { type H3Event, getRequestHeader } from 'h3'
import { addressKey } from '#server/services/people/count-try'
import type { Visitor } from '#server/services/people/sign-in'
import { deviceName } from '#shared/people/device-name'

/** Where a request comes from. Only the connection itself is believed: a header that names an address can be written by anybody. */
export function visitorOf(event: H3Event): Visitor {
  return {
    address: addressKey(event.node.req.socket.remoteAddress ?? 'unknown'),
    device: deviceName(getRequestHeader(event, 'user-agent')),
  }
}
