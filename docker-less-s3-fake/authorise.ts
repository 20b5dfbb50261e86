import { accessDenied, S3Error, signatureDoesNotMatch } from './s3-error'
import { ALGORITHM, readAmzDate, readScope, requestSignature, sameSignature, signingKey } from './signature'
import type { Credentials, Scope, SignedParts } from './signature'

const SKEW_MAX = 15 * 60_000
const EXPIRES_MAX = 7 * 24 * 3600
const UNSIGNED = 'UNSIGNED-PAYLOAD'

/** A request as far as its signature is concerned; header names in lower case. */
export interface RequestToCheck {
  method: string
  path: string
  query: [string, string][]
  headers: Record<string, string>
}

/** What a good signature says about the body that follows. */
export interface Authority {
  /** SHA-256 of the body in hex, or one of S3's words for a body that is hashed otherwise or not at all. */
  payloadHash: string
  amzDate: string
  scope: Scope
  key: Buffer
  signature: string
}

/** Every `x-amz-` header takes part in what happens, so each must be under the signature. */
function assertAllSigned(headers: Record<string, string>, signedHeaders: string[]): void {
  if (!signedHeaders.includes('host')) throw accessDenied('The host header must be signed')
  const loose = Object.keys(headers).filter(name => name.startsWith('x-amz-') && !signedHeaders.includes(name))
  if (loose.length > 0) throw accessDenied(`There were headers present in the request which were not signed: ${loose.join(', ')}`)
}

function check(parts: SignedParts, amzDate: string, credential: string, signature: string, credentials: Credentials): Authority {
  assertAllSigned(parts.headers, parts.signedHeaders)
  const scope = readScope(credential, credentials)
  if (!amzDate.startsWith(scope.day)) throw accessDenied('The credential is for another day')
  const key = signingKey(credentials, scope.day)
  if (!sameSignature(requestSignature(parts, amzDate, scope, key), signature)) throw signatureDoesNotMatch('check the secret key and the signing method')
  return { payloadHash: parts.payloadHash, amzDate, scope, key, signature }
}

function byHeader(request: RequestToCheck, authorization: string, credentials: Credentials, now: number): Authority {
  const match = /^AWS4-HMAC-SHA256 +Credential=([^,\s]+), *SignedHeaders=([^,\s]+), *Signature=([0-9a-f]{64})$/.exec(authorization)
  if (!match) throw accessDenied('The authorization header is malformed')
  const [, credential = '', signedHeaders = '', signature = ''] = match
  const amzDate = request.headers['x-amz-date'] ?? ''
  if (Math.abs(now - readAmzDate(amzDate)) > SKEW_MAX) {
    throw new S3Error('RequestTimeTooSkewed', 'The difference between the request time and the current time is too large.', 403)
  }
  const payloadHash = request.headers['x-amz-content-sha256']
  if (payloadHash === undefined) throw accessDenied('x-amz-content-sha256 is missing')
  return check({ ...request, signedHeaders: signedHeaders.split(';'), payloadHash }, amzDate, credential, signature, credentials)
}

function byQuery(request: RequestToCheck, credentials: Credentials, now: number): Authority {
  const given = new Map(request.query)
  const value = (name: string) => {
    const found = given.get(name)
    if (found === undefined) throw accessDenied(`The query parameter ${name} is missing`)
    return found
  }
  if (value('X-Amz-Algorithm') !== ALGORITHM) throw accessDenied('X-Amz-Algorithm only supports AWS4-HMAC-SHA256')
  const amzDate = value('X-Amz-Date')
  const expires = Number(value('X-Amz-Expires'))
  if (!Number.isInteger(expires) || expires < 1 || expires > EXPIRES_MAX) throw accessDenied('X-Amz-Expires must be between 1 second and 7 days')
  const signedAt = readAmzDate(amzDate)
  if (signedAt - now > SKEW_MAX) throw accessDenied('Request is not valid yet')
  const payloadHash = given.get('X-Amz-Content-Sha256') ?? request.headers['x-amz-content-sha256'] ?? UNSIGNED
  const parts: SignedParts = {
    ...request,
    query: request.query.filter(([name]) => name !== 'X-Amz-Signature'),
    signedHeaders: value('X-Amz-SignedHeaders').split(';'),
    payloadHash,
  }
  const authority = check(parts, amzDate, value('X-Amz-Credential'), value('X-Amz-Signature'), credentials)
  if (now > signedAt + expires * 1000) throw accessDenied('Request has expired')
  return authority
}

/** Lets a request in by its Authorization header or its presigned query; anyone without a signature stays out. */
export function authorise(request: RequestToCheck, credentials: Credentials, now: number): Authority {
  const authorization = request.headers.authorization
  const isPresigned = request.query.some(([name]) => name === 'X-Amz-Signature' || name === 'X-Amz-Algorithm')
  if (authorization !== undefined && isPresigned) throw accessDenied('Only one way of signing is allowed')
  if (authorization !== undefined) return byHeader(request, authorization, credentials, now)
  if (isPresigned) return byQuery(request, credentials, now)
  throw accessDenied()
}
