import type { PatientBox, RangeMm } from '../model/axes';
import { SIDES } from '../model/axes';
import type { Case } from '../model/case';
import type { KeepClear } from '../model/keep-clear';
import type { SitePolicy } from '../model/policy';
import type { Scanner } from '../model/scanner';
import { requireBetween, requireOneOf, requireThat, requireWhole } from './require';
import { validatePatient } from './validate-patient';
import { validatePrescription } from './validate-prescription';

function validateRange(argument: string, range: RangeMm): void {
  requireBetween(argument, range[0], -2000, 2000, 'mm');
  requireBetween(argument, range[1], -2000, 2000, 'mm');
  requireThat(
    range[0] < range[1],
    'range-reversed',
    argument,
    `${range[0]} to ${range[1]}`,
    'low first, then high',
  );
}

function validateBox(argument: string, box: PatientBox): void {
  validateRange(`${argument}.xMm`, box.xMm);
  validateRange(`${argument}.yMm`, box.yMm);
  validateRange(`${argument}.zMm`, box.zMm);
}

function validateKeepClear(keepClear: KeepClear): void {
  requireOneOf('keepClear.area.kind', keepClear.area.kind, ['whole-picture', 'box']);
  if (keepClear.area.kind === 'box') validateBox('keepClear.area.box', keepClear.area.box);
  if (keepClear.mustStayDisplayed !== undefined)
    validateBox('keepClear.mustStayDisplayed', keepClear.mustStayDisplayed);
}

function validateScanner(scanner: Scanner): void {
  requireBetween('scanner.fieldStrengthT', scanner.fieldStrengthT, 0.01, 20, 'T');
  requireOneOf('scanner.lineStep.kind', scanner.lineStep.kind, ['line', 'even-lines', 'percent', 'doubling']);
  if (scanner.lineStep.kind === 'percent') {
    requireBetween('scanner.lineStep.percent', scanner.lineStep.percent, 0.01, 100, '%');
  }
  requireWhole('scanner.partitionStep', scanner.partitionStep, 1, 256);
  requireBetween('scanner.tissueReachMm', scanner.tissueReachMm, 1, 2000, 'mm');
  requireBetween('scanner.respiratoryWindow', scanner.respiratoryWindow, 0.01, 1, '');
  scanner.coils?.forEach((coil, index) =>
    coil.elements.forEach((element, at) => {
      const name = `scanner.coils[${index}].elements[${at}]`;
      requireBetween(`${name}.seesFromMm`, element.seesFromMm, -2000, 2000, 'mm');
      requireBetween(`${name}.seesToMm`, element.seesToMm, element.seesFromMm, 2000, 'mm');
    }),
  );
  const { limits } = scanner;
  requireBetween('scanner.limits.fovMaxMm', limits.fovMaxMm, 1, 2000, 'mm');
  requireBetween('scanner.limits.fovMinMm', limits.fovMinMm, 0, limits.fovMaxMm, 'mm');
  limits.usableFovMm.forEach((value) => requireBetween('scanner.limits.usableFovMm', value, 1, 3000, 'mm'));
  requireWhole('scanner.limits.matrixMax', limits.matrixMax, 8, 16_384);
  requireWhole('scanner.limits.acquiredLinesMax', limits.acquiredLinesMax, 8, 16_384);
  requireBetween('scanner.limits.phaseOversamplingMaxPct', limits.phaseOversamplingMaxPct, 0, 1000, '%');
  requireBetween('scanner.limits.sliceOversamplingMaxPct', limits.sliceOversamplingMaxPct, 0, 1000, '%');
  requireBetween('scanner.limits.accelerationPhaseMax', limits.accelerationPhaseMax, 1, 16, '');
  requireBetween('scanner.limits.accelerationSliceMax', limits.accelerationSliceMax, 1, 16, '');
  requireBetween('scanner.limits.partialFourierMin', limits.partialFourierMin, 0.5, 1, '');
  requireWhole('scanner.limits.averagesMax', limits.averagesMax, 1, 256);
  requireWhole('scanner.limits.echoTrainMax', limits.echoTrainMax, 1, 4096);
  requireBetween('scanner.limits.tableLimitKg', limits.tableLimitKg, 1, 1000, 'kg');
}

function validatePolicy(policy: SitePolicy): void {
  for (const side of SIDES) requireBetween(`policy.marginMm.${side}`, policy.marginMm[side], 0, 200, 'mm');
  requireBetween('policy.tissueTolerance', policy.tissueTolerance, 0, 1, '');
  requireBetween('policy.slabTolerance', policy.slabTolerance, 0.0001, 1, '');
  requireBetween('policy.sureAt', policy.sureAt, 0.5, 0.999, '');
  requireBetween('policy.unknownTimeBandwidthProduct', policy.unknownTimeBandwidthProduct, 1, 64, '');
  if (policy.presaturationB1Scale !== undefined)
    requireBetween('policy.presaturationB1Scale', policy.presaturationB1Scale, 0.3, 2, '');
  requireBetween('policy.tissueT1Ms.parenchyma', policy.tissueT1Ms.parenchyma, 1, 10_000, 'ms');
  requireBetween('policy.tissueT1Ms.fat', policy.tissueT1Ms.fat, 1, 10_000, 'ms');
  requireBetween('policy.tolerateFoldOutsidePct', policy.tolerateFoldOutsidePct, 0, 100, '%');
  for (const [name, weight] of Object.entries(policy.weights)) {
    if (typeof weight === 'number') requireBetween(`policy.weights.${name}`, weight, 0, 100_000, 'points');
    else
      for (const [region, price] of Object.entries(weight))
        requireBetween(`policy.weights.${name}.${region}`, price as number, 0, 100_000, 'points');
  }
}

/**
 * Checks a whole case before anything is worked out, so that no later step meets a number outside its domain.
 * @throws DomainError naming the argument, the value given and what is allowed.
 */
export function validateCase(given: Case): void {
  validatePatient(given.patient);
  validatePrescription(given.prescription);
  validateKeepClear(given.keepClear);
  validateScanner(given.scanner);
  validatePolicy(given.policy);
}
