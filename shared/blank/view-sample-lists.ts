import type { View } from './view'

/** `part` of a sample on the body. */
export const PART_BODY = 0
/** `part` of a sample inside the open gap of a joint: drawn dark, at about an eighth of the coat's light. */
export const PART_GAP = 1
/** `part` of a sample on fin i of the blank is PART_FIN + i. */
export const PART_FIN = 2
/** `part` of a sub-pixel sample that hits nothing; its coverage is 0. */
export const PART_NONE = 255

/**
 * What the viewer sees of a blank, one entry per sample; a pixel on the edge between two parts has one
 * entry for each. The light of a pixel is Σ coverage·light + (1 - Σ coverage)·surround, in linear light.
 * Every array is typed and can be handed to a worker without copying.
 *
 * Triples and pairs lie one after the other: normal[3i], normal[3i+1], normal[3i+2].
 */
export interface ViewSamples {
  view: View
  /** Number of samples; arrays are exactly this long (times 3 or 2). */
  count: number
  /** row · width + column. */
  pixel: Uint32Array
  /** Share of the pixel this part fills, 0-1. */
  coverage: Float32Array
  /** PART_BODY, PART_GAP, PART_FIN + fin index, or PART_NONE. */
  part: Uint8Array
  /** Unit normal in the view frame, carved relief included. 3 per sample. */
  normal: Float32Array
  /** Unit normal the gloss follows: the clear has filled most of the relief. 3 per sample. */
  glossNormal: Float32Array
  /** Unit normal of the plain body in the body frame (x, y, z), for the aim of the gun. 3 per sample. */
  bodyNormal: Float32Array
  /** Place in the cross-section, mm: height above the section's centre, and z. 2 per sample. */
  section: Float32Array
  /** mm along the meridian from mid-length, + toward the tail. On fins: mm along from the fin's root point. */
  U: Float32Array
  /** mm round the girth from the widest line, + toward the back. On fins: mm above the fin's root point. */
  V: Float32Array
  /** Share of the widest meridian, 0 nose, 1 tail. On fins: of the body beside it. */
  u: Float32Array
  /** Share of the half girth, 0 back, ½ widest line, 1 belly. On fins: 0 above the axis, 1 below. */
  v: Float32Array
  /** 1 on the left flank, -1 on the right. */
  side: Int8Array
  /** Factor 0-1 on light that comes from all round: grooves, eye socket, fin roots, joints. */
  occlusion: Float32Array
  /** Root-to-tip share on fins, 0-1; 0 on the body. */
  rootToTip: Float32Array
  /** mm to the rim on fins; 0 on the body. */
  rim: Float32Array
  /** Slope across the rays of a fin, already in `normal`; 0 on the body. */
  raySlope: Float32Array
}

/** Room for `count` samples, all zero. */
export function emptyViewSamples(view: View, count: number): ViewSamples {
  return {
    view,
    count,
    pixel: new Uint32Array(count),
    coverage: new Float32Array(count),
    part: new Uint8Array(count),
    normal: new Float32Array(3 * count),
    glossNormal: new Float32Array(3 * count),
    bodyNormal: new Float32Array(3 * count),
    section: new Float32Array(2 * count),
    U: new Float32Array(count),
    V: new Float32Array(count),
    u: new Float32Array(count),
    v: new Float32Array(count),
    side: new Int8Array(count),
    occlusion: new Float32Array(count),
    rootToTip: new Float32Array(count),
    rim: new Float32Array(count),
    raySlope: new Float32Array(count),
  }
}

/** The buffers of a sample list, to hand over to or from a worker. */
export function samplesTransfer(samples: ViewSamples): ArrayBuffer[] {
  return Object.values(samples)
    .filter((value): value is Uint32Array | Float32Array | Uint8Array | Int8Array => ArrayBuffer.isView(value))
    .map(array => array.buffer as ArrayBuffer) // made by emptyViewSamples, never shared memory
}
