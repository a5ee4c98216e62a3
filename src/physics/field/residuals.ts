import type { Multipoles } from './translate.ts';
import { noMultipoles } from './translate.ts';

/**
 * One system (1 - A) x = b with A complex symmetric, solved by conjugate orthogonal conjugate residuals (Sogabe & Zhang 2007): short
 * recurrences, one product a step. The product itself is the caller's, so that two systems can share it.
 */
export interface Iteration {
  readonly x: Multipoles;
  readonly residual: Multipoles;
  /** (1 - A) times the residual: the caller fills it before each step. */
  readonly image: Multipoles;
  readonly direction: Multipoles;
  readonly directionImage: Multipoles;
  /** Square of the norm at which the residual is small enough. */
  target: number;
  settled: boolean;
  rhoRe: number;
  rhoIm: number;
}

export function newIteration(size: number): Iteration {
  return {
    x: noMultipoles(size),
    residual: noMultipoles(size),
    image: noMultipoles(size),
    direction: noMultipoles(size),
    directionImage: noMultipoles(size),
    target: 0,
    settled: false,
    rhoRe: 0,
    rhoIm: 0,
  };
}

/** Starts from x = 0; the residual is then the right-hand side, which the caller has put there. */
export function begin(it: Iteration, tolerance: number): void {
  for (const vector of [it.x, it.direction, it.directionImage]) {
    vector.re.fill(0);
    vector.im.fill(0);
  }
  const size = squaredNorm(it.residual);
  it.target = size * tolerance * tolerance;
  it.settled = size === 0;
  it.rhoRe = 0;
  it.rhoIm = 0;
}

/** One step, once `image` has been filled. */
export function step(it: Iteration): void {
  if (it.settled) return;
  const { x, residual, image, direction, directionImage } = it;
  const [xRe, xIm, rRe, rIm, sRe, sIm] = [x.re, x.im, residual.re, residual.im, image.re, image.im];
  const [pRe, pIm, qRe, qIm] = [direction.re, direction.im, directionImage.re, directionImage.im];
  const size = rRe.length;
  let rhoRe = 0;
  let rhoIm = 0;
  for (let i = 0; i < size; i++) {
    rhoRe += rRe[i]! * sRe[i]! - rIm[i]! * sIm[i]!;
    rhoIm += rRe[i]! * sIm[i]! + rIm[i]! * sRe[i]!;
  }
  // beta = rho/rho before; 0 at the first step.
  const before = it.rhoRe * it.rhoRe + it.rhoIm * it.rhoIm;
  const betaRe = before > 0 ? (rhoRe * it.rhoRe + rhoIm * it.rhoIm) / before : 0;
  const betaIm = before > 0 ? (rhoIm * it.rhoRe - rhoRe * it.rhoIm) / before : 0;
  let qqRe = 0;
  let qqIm = 0;
  for (let i = 0; i < size; i++) {
    const p = rRe[i]! + betaRe * pRe[i]! - betaIm * pIm[i]!;
    pIm[i] = rIm[i]! + betaRe * pIm[i]! + betaIm * pRe[i]!;
    pRe[i] = p;
    const q = sRe[i]! + betaRe * qRe[i]! - betaIm * qIm[i]!;
    const qIma = sIm[i]! + betaRe * qIm[i]! + betaIm * qRe[i]!;
    qRe[i] = q;
    qIm[i] = qIma;
    qqRe += q * q - qIma * qIma;
    qqIm += 2 * q * qIma;
  }
  const scale = 1 / (qqRe * qqRe + qqIm * qqIm);
  const alphaRe = (rhoRe * qqRe + rhoIm * qqIm) * scale;
  const alphaIm = (rhoIm * qqRe - rhoRe * qqIm) * scale;
  for (let i = 0; i < size; i++) {
    xRe[i]! += alphaRe * pRe[i]! - alphaIm * pIm[i]!;
    xIm[i]! += alphaRe * pIm[i]! + alphaIm * pRe[i]!;
    rRe[i]! -= alphaRe * qRe[i]! - alphaIm * qIm[i]!;
    rIm[i]! -= alphaRe * qIm[i]! + alphaIm * qRe[i]!;
  }
  it.rhoRe = rhoRe;
  it.rhoIm = rhoIm;
  it.settled = squaredNorm(residual) <= it.target;
}

function squaredNorm({ re, im }: Multipoles): number {
  let sum = 0;
  for (let i = 0; i < re.length; i++) sum += re[i]! * re[i]! + im[i]! * im[i]!;
  return sum;
}
