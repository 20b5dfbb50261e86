import { md5Hex, verifyChecksums } from './checksums'
import { xmlAnswer } from './exchange'
import { keptHeaders } from './object-operations'
import { accessDenied, invalidArgument, S3Error, signatureDoesNotMatch } from './s3-error'
import { ALGORITHM, hmac, readAmzDate, readScope, sameSignature, signingKey } from './signature'
import type { Bucket } from './bucket'
import type { S3Answer, S3Request } from './exchange'
import type { Credentials } from './signature'

/** A form as a browser posts it, field names in lower case. */
interface UploadForm {
  fields: Record<string, string>
  bytes: Buffer
}

/** Fields a policy need not speak about. */
const FREE = new Set(['policy', 'x-amz-signature', 'file'])

async function readForm(request: S3Request): Promise<UploadForm> {
  const headers = { 'content-type': request.headers['content-type'] ?? '' }
  const form = await new Response(new Uint8Array(request.body), { headers }).formData().catch(() => {
    throw new S3Error('MalformedPOSTRequest', 'The body of your POST request is not well-formed multipart/form-data.', 400)
  })
  const fields: Record<string, string> = {}
  let file: File | undefined
  for (const [name, value] of form) {
    if (typeof value === 'string') fields[name.toLowerCase()] = value
    else if (name === 'file') file = value
  }
  if (!file) throw invalidArgument('POST requires exactly one file upload per request.')
  if (fields.key !== undefined) fields.key = fields.key.replaceAll('${filename}', file.name)
  return { fields, bytes: Buffer.from(await file.arrayBuffer()) }
}

function assertSigned(fields: Record<string, string>, credentials: Credentials): string {
  const { policy, 'x-amz-algorithm': algorithm, 'x-amz-credential': credential, 'x-amz-date': date, 'x-amz-signature': signature } = fields
  if (policy === undefined || credential === undefined || date === undefined || signature === undefined) throw accessDenied()
  if (algorithm !== ALGORITHM) throw accessDenied('x-amz-algorithm only supports AWS4-HMAC-SHA256')
  const scope = readScope(credential, credentials)
  if (!date.startsWith(scope.day)) throw accessDenied('The credential is for another day')
  readAmzDate(date)
  if (!sameSignature(hmac(signingKey(credentials, scope.day), policy).toString('hex'), signature)) throw signatureDoesNotMatch('the policy was changed')
  return policy
}

const failed = (condition: unknown) => accessDenied(`Invalid according to Policy: Policy Condition failed: ${JSON.stringify(condition)}`)

/** Holds one condition against the form; returns the field it speaks about. */
function assertCondition(condition: unknown, fields: Record<string, string>, bytes: number): string | undefined {
  if (!Array.isArray(condition)) {
    const [entry] = typeof condition === 'object' && condition !== null ? Object.entries(condition) : []
    if (!entry) throw failed(condition)
    return assertCondition(['eq', `$${entry[0]}`, entry[1]], fields, bytes)
  }
  const [kind, subject, value] = condition as unknown[]
  if (String(kind).toLowerCase() === 'content-length-range') {
    if (bytes < Number(subject)) throw new S3Error('EntityTooSmall', 'Your proposed upload is smaller than the minimum allowed size', 400)
    if (!(bytes <= Number(value))) throw new S3Error('EntityTooLarge', 'Your proposed upload exceeds the maximum allowed size', 400)
    return undefined
  }
  const name = String(subject).replace(/^\$/, '').toLowerCase()
  const given = fields[name] ?? ''
  const holds = kind === 'eq' ? given === value : kind === 'starts-with' && given.startsWith(String(value))
  if (!holds) throw failed(condition)
  return name
}

function assertPolicy(policy: string, form: UploadForm, bucket: string, now: number): void {
  let terms: { expiration?: unknown, conditions?: unknown }
  try {
    terms = JSON.parse(Buffer.from(policy, 'base64').toString('utf8')) as typeof terms
  }
  catch {
    throw accessDenied('Invalid Policy: Invalid JSON.')
  }
  const expiresAt = Date.parse(String(terms.expiration))
  if (!(now <= expiresAt)) throw accessDenied('Invalid according to Policy: Policy expired.')
  if (!Array.isArray(terms.conditions)) throw accessDenied('Invalid Policy: conditions are missing.')
  const fields = { ...form.fields, bucket }
  const covered = new Set(terms.conditions.map(condition => assertCondition(condition, fields, form.bytes.length)))
  const extra = Object.keys(form.fields).find(name => !covered.has(name) && !FREE.has(name) && !name.startsWith('x-ignore-'))
  if (extra !== undefined) throw accessDenied(`Invalid according to Policy: Extra input fields: ${extra}`)
}

/** Takes a file from a browser's form under the terms of a signed policy (POST Object). */
export async function postForm(bucket: Bucket, request: S3Request, credentials: Credentials, now: number): Promise<S3Answer> {
  const form = await readForm(request)
  assertPolicy(assertSigned(form.fields, credentials), form, bucket.name, now)
  const { key, success_action_status: status } = form.fields
  if (!key) throw invalidArgument('Bucket POST must contain a field named \'key\'.')
  const etag = md5Hex(form.bytes)
  const checksums = verifyChecksums(form.bytes, form.fields)
  await bucket.put({ key, bytes: form.bytes.length, etag, headers: keptHeaders(form.fields), checksums }, form.bytes, () => undefined)
  const headers = { etag: `"${etag}"` }
  if (status === '201') {
    return xmlAnswer('PostResponse', { Location: `http://${request.headers.host}/${bucket.name}/${key}`, Bucket: bucket.name, Key: key, ETag: `"${etag}"` }, 201, headers)
  }
  return { status: status === '200' ? 200 : 204, headers }
}
