/** What one phase of powered flight burns and leaves behind. SI; masses without payload and fairing. */
export interface Phase {
  /** Vacuum thrust and mass flow of what is not throttled: boosters. */
  readonly fixedThrust: number;
  readonly fixedFlow: number;
  /** Vacuum thrust and mass flow, at full throttle, of what is. */
  readonly mainThrust: number;
  readonly mainFlow: number;
  /** Exit area of every engine that burns, m². */
  readonly exitArea: number;
  /** Reference area of drag, m². */
  readonly area: number;
  /** Greatest axial acceleration, vacuum thrust over mass, m/s²; Infinity where there is none. */
  readonly accelerationLimit: number;
  /** Seconds, where the phase ends by the clock; else it ends at `endMass`. */
  readonly duration?: number | undefined;
  /** Mass at the end of the phase, before anything is dropped. Not read where the phase ends by the clock. */
  readonly endMass: number;
  /** Left behind at the end. */
  readonly dropped: number;
  /** Whether the fairing leaves at the end as well. */
  readonly dropsFairing: boolean;
  /** 0 for what climbs by rise, kick and gravity turn; above 0 for what the linear tangent steers, and may inject. */
  readonly stage: number;
}

/** Drag coefficient by Mach number, rising; straight between, level beyond the ends. */
export type DragTable = readonly (readonly [mach: number, coefficient: number])[];

/** A vehicle laid out for flight. */
export interface Stack {
  readonly phases: readonly Phase[];
  /** At lift-off, without payload and fairing. */
  readonly liftOffMass: number;
  readonly fairingMass: number;
  readonly drag: DragTable;
  readonly verticalRise: number;
  readonly kick: number;
  /** Pa; Infinity where there is no limit. */
  readonly dynamicPressureLimit: number;
  /** Free-molecular heating ½ρv³ in W/m² below which the fairing leaves; 0 where it leaves with a stage. */
  readonly fairingHeating: number;
}
