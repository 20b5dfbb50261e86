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

/** Somebody who may not. */
export const accessDenied = (message = 'Access Denied') => new S3Error('AccessDenied', message, 403)
/** A body that is not what its sum says. */
export const badDigest = (what: string) => new S3Error('BadDigest', `The ${what} you specified did not match what we received.`, 400)
/** A parameter that makes no sense. */
export const invalidArgument = (message: string) => new S3Error('InvalidArgument', message, 400)
/** A request that contradicts itself. */
export const invalidRequest = (message: string) => new S3Error('InvalidRequest', message, 400)
/** Something S3 does and this server does not. */
export const notImplemented = (what: string) => new S3Error('NotImplemented', `${what} is not implemented here.`, 501)
/** A key with nothing under it. */
export const noSuchKey = () => new S3Error('NoSuchKey', 'The specified key does not exist.', 404)
/** An upload in parts that never began or is done with. */
export const noSuchUpload = () => new S3Error('NoSuchUpload', 'The specified multipart upload does not exist.', 404)
/** A condition of the request that does not hold. */
export const preconditionFailed = () =>
  new S3Error('PreconditionFailed', 'At least one of the pre-conditions you specified did not hold', 412)
/** A request that was changed after it was signed, or signed with another secret. */
export const signatureDoesNotMatch = (why: string) =>
  new S3Error('SignatureDoesNotMatch', `The request signature we calculated does not match the signature you provided: ${why}`, 403)
/** A body beyond the longest that is taken. */
export const tooLarge = (most: number) =>
  new S3Error('EntityTooLarge', `Your proposed upload exceeds the maximum allowed size of ${most} bytes`, 400)
