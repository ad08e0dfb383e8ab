/** The state earth is counted in: in the ground, in the truck, in the fill. */
export type VolumeKind = 'bank' | 'loose' | 'compacted'

/** A volume with its kind, cm³. Two kinds can not be added, by type and at run time. */
export interface Volume<Kind extends VolumeKind> {
  readonly kind: Kind
  readonly cm3: number
}

/** How much a material grows when dug and shrinks when compacted, both of the volume in the ground, in percent. */
export interface SwellShrink {
  /** above -100; 25 means that 1 bank becomes 1.25 loose */
  readonly swellPercent: number
  /** below 100; 10 means that 1 bank becomes 0.90 compacted; negative where fill takes more room than the bank */
  readonly shrinkPercent: number
}

/** A volume of a kind. */
export function volumeOf<Kind extends VolumeKind>(kind: Kind, cm3: number): Volume<Kind> {
  return { kind, cm3 }
}

/**
 * Sum of two volumes of one kind.
 * @throws RangeError when the kinds differ (a programmer's error that types were made to hide)
 */
export function addVolumes<Kind extends VolumeKind>(a: Volume<Kind>, b: Volume<NoInfer<Kind>>): Volume<Kind> {
  if (a.kind !== b.kind) throw new RangeError(`A ${b.kind} volume can not be added to a ${a.kind} one`)
  return { kind: a.kind, cm3: a.cm3 + b.cm3 }
}

/** Loose = bank · (1 + swell) (published swell and shrink tables). */
export function looseFromBank(bank: Volume<'bank'>, { swellPercent }: Pick<SwellShrink, 'swellPercent'>): Volume<'loose'> {
  return volumeOf('loose', bank.cm3 * (1 + swellPercent / 100))
}

/** Bank = compacted / (1 − shrink) (published swell and shrink tables). */
export function bankFromCompacted(
  compacted: Volume<'compacted'>,
  { shrinkPercent }: Pick<SwellShrink, 'shrinkPercent'>,
): Volume<'bank'> {
  return volumeOf('bank', compacted.cm3 / (1 - shrinkPercent / 100))
}

/** Load factor = bank / loose = 1 / (1 + swell), without unit (published swell and shrink tables). */
export function loadFactor({ swellPercent }: Pick<SwellShrink, 'swellPercent'>): number {
  return 1 / (1 + swellPercent / 100)
}

/**
 * What one loose volume becomes when compacted: (1 − shrink) / (1 + swell), without unit (published swell and shrink tables).
 * The same number as loose dry density over compacted dry density (domain section 1).
 */
export function looseToCompactedFactor(material: SwellShrink): number {
  return loadFactor(material) * (1 - material.shrinkPercent / 100)
}

/**
 * Compacted volume of a loose one.
 * @param loose loose volume, cm³
 * @param factor looseToCompactedFactor of the material, above 0
 * @returns cm³, not rounded
 */
export function compactedFromLoose(loose: Volume<'loose'>, factor: number): Volume<'compacted'> {
  return volumeOf('compacted', loose.cm3 * factor)
}
