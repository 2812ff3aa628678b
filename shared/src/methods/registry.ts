import { annihilationEnergy, annihilationPower } from './annihilation/annihilation-energy';
import { gammaShield, gammaTransmission, mixtureAttenuation } from './annihilation/gamma-attenuation';
import { annihilationSplit } from './annihilation/product-split';
import { shieldHeating } from './annihilation/shield-heating';
import { kineticEnergy } from './energy/kinetic-energy';
import {
  integratedEfficiency,
  optimumMassRatio,
  propulsiveEfficiency,
  relativisticIntegratedEfficiency,
} from './energy/propulsive-efficiency';
import { fusionExhaustSpeed } from './fusion/exhaust-speed';
import {
  deuteriumHelium3,
  deuteriumNeutronBranch,
  deuteriumProtonBranch,
  deuteriumTritium,
  fuelSpecificEnergy,
} from './fusion/reaction-energy';
import { heatSinkCooling, heatSinkStorage, heatSinkWarming } from './heat-sink/heat-sink';
import { electricAcceleration, startAcceleration } from './jet/acceleration';
import { electricThrust, electricThrustExhaustSpeed, electricThrustingTime } from './jet/electric-thrust';
import { ionBeam, ionThruster } from './jet/ion-thruster';
import { jetPower, massFlowThrust, photonThrust, relativisticJetPower } from './jet/jet-power';
import { characteristicSpeed, optimumExhaustSpeed, powerLimitedPayload } from './jet/optimum-exhaust-speed';
import { specificPower } from './jet/specific-power';
import { thrusterEfficiency } from './jet/thruster-efficiency';
import { massMargins, massRollUp } from './mass/mass-roll-up';
import { dustImpact, interstellarHeating } from './medium/gas-heating';
import { isentropicFlow, nozzleAreaRatio, nozzleExhaustSpeed } from './nozzle/exhaust';
import { nozzlePerformance, nozzlePerformanceAreaRatio, nozzleThroat } from './nozzle/performance';
import { heatEngineRadiator, heatEngineRadiatorOptimum } from './radiator/carnot';
import { radiatorConvexEnvelope } from './radiator/convex-envelope';
import { cylinderEnvelopeArea, radialFinEnvelope } from './radiator/cylinder-envelope';
import { radiatorHeatRejection } from './radiator/heat-rejection';
import { impliedEfficiency } from './radiator/implied-efficiency';
import { radiatorSizing } from './radiator/sizing';
import {
  fourthRootTemperature,
  plateFacingStar,
  steadySurfaceTemperature,
  surfaceFluxRatio,
} from './radiator/surface-temperature';
import { exhaustWithLosses } from './relativistic/exhaust-with-losses';
import {
  relativisticMassRatio,
  relativisticPropellant,
  relativisticRocketSpeed,
} from './relativistic/relativistic-rocket';
import { relativisticStages } from './relativistic/relativistic-stages';
import { deltaVWithLosses, verticalBurn } from './rocket/losses';
import { propellantForDeltaV, propellantForDeltaVExhaustSpeed } from './rocket/propellant-for-delta-v';
import { propellantLoad } from './rocket/propellant-load';
import { rocketEquation, rocketEquationExhaustSpeed } from './rocket/rocket-equation';
import { specificImpulse } from './rocket/specific-impulse';
import { equalStages, stagePayloadFraction, stagedRocket } from './rocket/staging';
import { accelerationDistance, beamDiffraction, beamedSail } from './sail/beamed-sail';
import { sailTemperature } from './sail/sail-temperature';
import { irradianceAtDistance, lightPressure, solarSailLoading } from './sail/solar-sail';
import { axialBuckling, cylinderBuckling, endBuckling, sphereBuckling } from './tank/buckling';
import {
  allowableStressMethod,
  cylindricalShellMass,
  cylindricalTankWall,
  ellipsoidalEnds,
  sphericalTank,
} from './tank/shells';
import { boilOff, performanceFactorTank, tankVolume } from './tank/volume';
import { circularOrbit, escapeDeltaV } from './transfer/escape';
import { biellipticTransfer, hohmannTransfer } from './transfer/hohmann';
import { edelbaumTransfer } from './transfer/low-thrust';
import { planeAngle, planeChange } from './transfer/plane-change';
import { accelerateOverDistance, constantAcceleration } from './trip/constant-acceleration';
import { flipAndBurn, tripWithCruise } from './trip/flip-and-burn';
import type { Method } from './types';

/** Every version of every method, by family. */
export const METHODS: readonly Method[] = [
  verticalBurn,
  deltaVWithLosses,
  propellantForDeltaV,
  propellantForDeltaVExhaustSpeed,
  propellantLoad,
  rocketEquation,
  rocketEquationExhaustSpeed,
  specificImpulse,
  stagePayloadFraction,
  equalStages,
  stagedRocket,
  exhaustWithLosses,
  relativisticMassRatio,
  relativisticPropellant,
  relativisticRocketSpeed,
  relativisticStages,
  constantAcceleration,
  accelerateOverDistance,
  flipAndBurn,
  tripWithCruise,
  kineticEnergy,
  propulsiveEfficiency,
  integratedEfficiency,
  optimumMassRatio,
  relativisticIntegratedEfficiency,
  startAcceleration,
  electricAcceleration,
  electricThrust,
  electricThrustExhaustSpeed,
  electricThrustingTime,
  ionBeam,
  ionThruster,
  jetPower,
  relativisticJetPower,
  photonThrust,
  massFlowThrust,
  characteristicSpeed,
  powerLimitedPayload,
  optimumExhaustSpeed,
  specificPower,
  thrusterEfficiency,
  nozzleExhaustSpeed,
  nozzleAreaRatio,
  isentropicFlow,
  nozzleThroat,
  nozzlePerformance,
  nozzlePerformanceAreaRatio,
  heatEngineRadiator,
  heatEngineRadiatorOptimum,
  radiatorConvexEnvelope,
  cylinderEnvelopeArea,
  radialFinEnvelope,
  radiatorHeatRejection,
  impliedEfficiency,
  radiatorSizing,
  fourthRootTemperature,
  surfaceFluxRatio,
  steadySurfaceTemperature,
  plateFacingStar,
  heatSinkCooling,
  heatSinkStorage,
  heatSinkWarming,
  annihilationEnergy,
  annihilationPower,
  gammaTransmission,
  gammaShield,
  mixtureAttenuation,
  annihilationSplit,
  shieldHeating,
  fusionExhaustSpeed,
  deuteriumTritium,
  deuteriumHelium3,
  deuteriumNeutronBranch,
  deuteriumProtonBranch,
  fuelSpecificEnergy,
  beamedSail,
  beamDiffraction,
  accelerationDistance,
  sailTemperature,
  lightPressure,
  solarSailLoading,
  irradianceAtDistance,
  escapeDeltaV,
  circularOrbit,
  hohmannTransfer,
  biellipticTransfer,
  edelbaumTransfer,
  planeChange,
  planeAngle,
  interstellarHeating,
  dustImpact,
  endBuckling,
  cylinderBuckling,
  sphereBuckling,
  axialBuckling,
  sphericalTank,
  cylindricalTankWall,
  cylindricalShellMass,
  ellipsoidalEnds,
  allowableStressMethod,
  tankVolume,
  boilOff,
  performanceFactorTank,
  massRollUp,
  massMargins,
];

/** Versions of each method, oldest first. */
const byId = new Map<string, Method[]>();
for (const method of METHODS) byId.set(method.id, [...(byId.get(method.id) ?? []), method].sort(compareVersions));

/** The method with this id: the version asked for, or the newest. */
export function methodById(id: string, version?: string): Method | undefined {
  const versions = byId.get(id);
  return version === undefined ? versions?.at(-1) : versions?.find((method) => method.version === version);
}

/** The newest version of the method with this id. */
export function newestVersion(id: string): string | undefined {
  return byId.get(id)?.at(-1)?.version;
}

function compareVersions(a: Method, b: Method): number {
  const [left, right] = [a, b].map((method) => method.version.split('.').map(Number));
  for (let index = 0; index < 3; index += 1) {
    const difference = (left?.[index] ?? 0) - (right?.[index] ?? 0);
    if (difference !== 0) return difference;
  }
  return 0;
}
