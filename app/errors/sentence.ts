import type { ProblemData } from '#shared/errors/problem'

/** What a refusal says to a person: what happened, then what they can do about it. */
export function sentence(problem: ProblemData): string {
  switch (problem.code) {
    case 'auth/signed-out': return 'You are signed out. Sign in again; what you typed stays here meanwhile.'
    case 'auth/wrong-sign-in': return 'The address and the password do not fit together. Try again, or choose a new password.'
    case 'auth/too-many-tries': return `That was tried too often. Wait ${waitWords(problem.retryAfterSeconds)}, then try again.`
    case 'auth/no-workshop': return 'You are in no workshop now. Choose one of yours, or open one.'
    case 'auth/not-allowed': return 'Your role in this workshop does not include this. Ask an owner.'
    case 'request/forbidden-origin': return 'This came from another site, so nothing was changed. Open the workshop itself and try there.'
    case 'request/not-found': return 'There is nothing at this address.'
    case 'request/too-large': return 'This is more than can be taken at once. Make it smaller.'
    case 'request/if-match-missing': return 'It is not clear which version this change was made to. Load the page again.'
    case 'request/idempotency-key-reused': return 'This was sent before with other content. Load the page and try again.'
    case 'input/invalid': return problem.fields.length > 0 ? 'Something here is not as it should be. See the marked lines.' : 'Something here is not as it should be.'
    case 'people/email-taken': return 'This address has a place here already. Sign in with it.'
    case 'people/link-ended': return 'This link has ended: it was used, taken back, or its time ran out. Ask for a new one.'
    case 'people/not-found': return 'They are no longer in this workshop. Load the list again.'
    case 'people/last-owner': return 'A workshop keeps at least one owner. Make somebody else an owner first.'
    case 'people/already-member': return 'They are in this workshop already.'
    case 'workshop/not-found': return 'This workshop is gone, or you are no longer in it.'
    case 'workshop/not-demo': return 'Only a demo workshop can be taken away with everything in it. This one stays.'
    case 'paint/not-found': return 'This paint is not on the shelf of this workshop.'
    case 'paint/changed-meanwhile': return 'Somebody changed this paint after you opened it. Load it again; what you typed stays until you do.'
    case 'paint/unknown-colour': return `This does not give a colour to calculate with: ${problem.reason}`
    case 'bottle/not-found': return 'This bottle is not on the shelf of this workshop.'
    case 'bottle/changed-meanwhile': return 'Somebody changed this bottle after you opened it. Load it again; what you typed stays until you do.'
    case 'blank/not-found': return 'This blank is not in this workshop.'
    case 'blank/changed-meanwhile': return 'Somebody changed this blank after you opened it. Load it again; what you typed stays until you do.'
    case 'blank/built-in': return 'This blank came with the workshop and keeps its shape. Copy it, and change the copy.'
    case 'mask/not-found': return 'This mask is not in this workshop.'
    case 'mask/changed-meanwhile': return 'Somebody changed this mask after you opened it. Load it again.'
    case 'scheme/not-found': return 'This scheme is gone, or was never in this workshop.'
    case 'scheme/changed-meanwhile': return 'Somebody saved this scheme after you opened it. Nothing of yours is lost: compare, then decide.'
    case 'scheme/not-publishable': return `Not ready to publish: ${problem.reasons.join(' ')}`
    case 'scheme/nothing-changed': return 'Nothing changed since the newest revision, so there is nothing to publish.'
    case 'scheme/never-published': return 'This scheme has no revision yet. Publish one first.'
    case 'scheme/too-many-listening': return 'Too many screens have this draft open at once. This one does not show who else is here.'
    case 'revision/not-found': return 'This scheme has no revision of that number.'
    case 'build-up/not-found': return 'This build-up is not in this workshop.'
    case 'build-up/changed-meanwhile': return 'Somebody changed this build-up after you opened it. Load it again.'
    case 'run/not-found': return 'This run is not in this workshop.'
    case 'run/finished': return 'This run is finished; nothing more is noted in it.'
    case 'run/too-many-listening': return 'Too many screens follow this at once. This one asks for news every few seconds instead.'
    case 'run/event-refused': return `This could not be noted: ${problem.reason}`
    case 'photo/not-found': return 'This photo is gone.'
    case 'photo/not-an-image': return 'This is not a photo we can read. Save it as JPEG, PNG or WebP and add it again.'
    case 'photo/too-large': return `This photo is too large: at most ${Math.floor(problem.maxBytes / 2 ** 20)} MB and ${Math.floor(problem.maxPixels / 1_000_000)} million pixels.`
    case 'picture/too-many-waiting': return `Many pictures are being painted. Ask for this one again in ${waitWords(problem.retryAfterSeconds)}.`
    case 'photo/too-many': return `A scheme keeps at most ${problem.max} photos. Take one away first.`
    case 'photo/unreadable': return 'This photo is damaged and could not be opened. Take it again, or save it anew.'
    case 'card/not-found': return 'This card is gone, or its link was taken back.'
    case 'card/changed-meanwhile': return 'Somebody changed this card after you opened it. Load it again.'
    case 'card/no-photo': return 'A card needs a photo before it can be shared.'
    case 'server/failed': return 'Something on our side went wrong, and it was written down. What was saved is safe; try again.'
  }
}

function waitWords(seconds: number): string {
  if (seconds < 90) return `${seconds} seconds`
  const minutes = Math.ceil(seconds / 60)
  return minutes < 90 ? `${minutes} minutes` : `${Math.ceil(minutes / 60)} hours`
}
