/** A refusal in S3's own words: code, sentence and HTTP status. */
export class S3Error extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly status: number,
    readonly headers: Record<string, string> = {},
  ) {
    super(message)
    this.name = 'S3Error'
  }
}

export const accessDenied = (message = 'Access Denied') => new S3Error('AccessDenied', message, 403)
export const badDigest = (what: string) => new S3Error('BadDigest', `The ${what} you specified did not match what we received.`, 400)
export const invalidArgument = (message: string) => new S3Error('InvalidArgument', message, 400)
export const invalidRequest = (message: string) => new S3Error('InvalidRequest', message, 400)
export const notImplemented = (what: string) => new S3Error('NotImplemented', `${what} is not implemented here.`, 501)
export const noSuchKey = () => new S3Error('NoSuchKey', 'The specified key does not exist.', 404)
export const noSuchUpload = () => new S3Error('NoSuchUpload', 'The specified multipart upload does not exist.', 404)
export const preconditionFailed = () =>
  new S3Error('PreconditionFailed', 'At least one of the pre-conditions you specified did not hold', 412)
export const signatureDoesNotMatch = (why: string) =>
  new S3Error('SignatureDoesNotMatch', `The request signature we calculated does not match the signature you provided: ${why}`, 403)
export const tooLarge = (most: number) =>
  new S3Error('EntityTooLarge', `Your proposed upload exceeds the maximum allowed size of ${most} bytes`, 400)
