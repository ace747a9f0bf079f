import { describe, expect, test } from 'vitest';
import { braceAngle } from '#shared/figures/braceAngle.ts';
import { fallClearance } from '#shared/figures/fallClearance.ts';
import { holdDowns } from '#shared/figures/holdDowns.ts';
import { ladder } from '#shared/figures/ladder.ts';
import { loadShare } from '#shared/figures/loadShare.ts';
import { sling } from '#shared/figures/sling.ts';
import { swingFall } from '#shared/figures/swingFall.ts';
import { beaufortFrom, wind } from '#shared/figures/wind.ts';
import { expectAll, expectNear, published } from './figures-examples.ts';

const foot = 0.3048;
const noTerms = { lanyardM: 0, tearOutM: 0, harnessStretchM: 0, attachmentHeightM: 0, marginM: 0 };

describe('Room to fall', () => {
  published('fall-2m-lanyard-6', ({ inputs, expected, tolerance }) => {
    const { requiredBelowAnchorM } = fallClearance.compute({
      ...noTerms,
      lanyardM: inputs.lanyard,
      tearOutM: inputs.deployment,
      marginM: inputs.safety,
    });
    expectNear(requiredBelowAnchorM, expected.total_m, tolerance);
  });

  published('fall-us-18.5', ({ inputs, expected, tolerance }) => {
    const { requiredBelowAnchorM, freeFallM } = fallClearance.compute({
      ...noTerms,
      lanyardM: inputs.lanyard_ft * foot,
      tearOutM: inputs.decel_ft * foot,
      attachmentHeightM: inputs.body_ft * foot,
      marginM: inputs.safety_ft * foot,
    });
    expectNear(requiredBelowAnchorM / foot, expected.total_ft, tolerance);
    expectNear(freeFallM / foot, inputs.lanyard_ft, tolerance);
  });

  published('fall-srl-classB-12.5', ({ inputs, expected, tolerance }) => {
    const { requiredBelowAnchorM } = fallClearance.compute({
      ...noTerms,
      tearOutM: inputs.activation_decel_ft * foot,
      harnessStretchM: inputs.stretch_shift_ft * foot,
      attachmentHeightM: inputs.dring_ft * foot,
      marginM: inputs.safety_ft * foot,
    });
    expectNear(requiredBelowAnchorM / foot, expected.total_ft, tolerance.total_ft);
    expectNear(requiredBelowAnchorM, expected.total_m, tolerance.total_m);
  });

  published('fall-srl-le-17.5', ({ inputs, expected, tolerance }) => {
    const { requiredBelowAnchorM } = fallClearance.compute({
      ...noTerms,
      tearOutM: inputs.decel_ft * foot,
      harnessStretchM: inputs.shift_ft * foot,
      attachmentHeightM: inputs.dring_ft * foot,
      marginM: inputs.safety_ft * foot,
    });
    expectNear(requiredBelowAnchorM / foot, expected.total_ft, tolerance);
  });

  published('fall-sum-12ft', ({ inputs, expected, tolerance }) => {
    const { requiredBelowAnchorM } = fallClearance.compute({
      ...noTerms,
      lanyardM: inputs.free_fall * foot,
      tearOutM: (inputs.decel + inputs.elongation) * foot,
      harnessStretchM: inputs.harness * foot,
      marginM: inputs.safety * foot,
    });
    expectNear(requiredBelowAnchorM / foot, expected.total_ft, tolerance);
  });

  test('a 2 m lanyard with 1.75 m absorber, 0.3 m stretch, a person of 1.8 m and 1 m to spare needs 6.85 m: an Australian supplier’s page', () => {
    const { requiredBelowAnchorM } = fallClearance.compute({
      lanyardM: 2,
      tearOutM: 1.75,
      harnessStretchM: 0.3,
      attachmentHeightM: 1.8,
      marginM: 1,
    });
    expectNear(requiredBelowAnchorM, 6.85, 1e-9);
  });

  published('osha-pfas-limits', ({ expected }) => {
    const warned = (lanyardM: number) => fallClearance.compute({ ...noTerms, lanyardM }).warnings.join(' ');
    expect(warned(expected.free_fall_ft * foot)).toContain('United States');
    expect(warned(1.8)).toBe('');
    expect(warned(2)).not.toContain('Australia');
    expect(warned(2.01)).toContain('Australia');
  });

  published('fall-swing', ({ inputs, expected, tolerance }) => {
    const { extraDropM, speedMs } = swingFall.compute({
      verticalM: inputs.vertical_h,
      offsetM: inputs.offset,
    });
    expectNear(extraDropM, expected.extra_drop_m, tolerance);
    expectNear(speedMs, Math.sqrt(2 * 9.80665 * (Math.sqrt(13) - 3)), 1e-12);
  });
});

describe('Ladder', () => {
  published('ladder-angle-height-rule', ({ inputs, expected, tolerance }) => {
    const { angleDeg, baseOffsetM } = ladder.compute({ landingHeightM: inputs.height });
    expectNear(angleDeg, expected.angle_deg, tolerance);
    expectNear(baseOffsetM, inputs.base, 0);
  });

  published('ladder-angle-length-rule', ({ inputs, expected, tolerance }) => {
    const height = Math.sqrt(inputs.working_length ** 2 - inputs.base ** 2);
    const { quarterLengthAngleDeg, quarterLengthOffsetM } = ladder.compute({ landingHeightM: height });
    expectNear(quarterLengthAngleDeg, expected.angle_deg, tolerance);
    expectNear(quarterLengthOffsetM, inputs.base, 1e-12);
  });

  test('a landing 20 ft up puts the foot 5 ft out: a ladder page quoting 4 to 1', () => {
    expectNear(ladder.compute({ landingHeightM: 20 * foot }).baseOffsetM / foot, 5, 1e-12);
  });
});

describe('Braces and hold-downs', () => {
  published('brace-geometry', ({ inputs, expected, tolerance }) => {
    (inputs.angle_to_wall_deg as number[]).forEach((bestDeg, i) => {
      const { trussesCrossed, runM, braceLengthM } = braceAngle.compute({
        slopeLengthM: inputs.plane_width_m,
        trussSpacingM: inputs.truss_spacing_m[i],
        bestDeg,
      });
      expect(trussesCrossed).toBe(expected.trusses_crossed[i]);
      // Whole spaces come to the run of the exact angle or stop within the last space before it.
      expect(runM).toBeLessThanOrEqual(expected.run_m[i] + tolerance);
      expect(runM).toBeGreaterThan(expected.run_m[i] - inputs.truss_spacing_m[i]);
      expect(braceLengthM).toBeLessThanOrEqual(expected.length_m[i] + tolerance);
    });
    const { runM, braceLengthM, angleDeg } = braceAngle.compute({ slopeLengthM: 6, trussSpacingM: 0.6 });
    expectAll([runM, braceLengthM, angleDeg], [6, 8.485, 45], tolerance);
  });

  published('hold-down-count', ({ inputs, expected }) => {
    const counts = (inputs.panel_m as number[]).map(
      (metres) => holdDowns.compute({ panelMm: metres * 1000, spacingMm: inputs.spacing_m * 1000 }).count,
    );
    expect(counts).toEqual(expected);
  });
});

describe('Wind', () => {
  published('wind-dynamic-pressure', ({ inputs, expected, tolerance }) => {
    const pressures = (inputs.V as number[]).map(
      (speedMs) => wind.compute({ speedMs, areaM2: 1, airDensity: inputs.rho }).pressurePa,
    );
    expectAll(pressures, expected.q_Pa, tolerance);
  });

  published('wind-45-pressures', ({ inputs, expected, tolerance }) => {
    const at = (coefficient: number) => wind.compute({ speedMs: 45, areaM2: 1, coefficient });
    expectNear(at(1).pressurePa / 1000, inputs.q_kPa, tolerance);
    // The sign of a coefficient says which way the wind pushes; the figure gives how hard.
    (inputs.Cp as number[]).forEach((cp, i) => {
      expectNear(at(Math.abs(cp)).forceN / 1000, Math.abs(expected[i]), tolerance);
    });
  });

  published('wind-45-force', ({ inputs, expected, tolerance }) => {
    const { forceN } = wind.compute({ speedMs: 45, areaM2: inputs.area_m2, coefficient: 0.8 });
    expectNear(forceN / 1000, expected.kN, tolerance);
  });

  const force = (speedMs: number) => wind.compute({ speedMs, areaM2: 1 }).beaufort;

  published('beaufort-lower-bounds', ({ inputs, expected }) => {
    expect([...beaufortFrom]).toEqual(expected);
    expect((expected as number[]).map(force)).toEqual(inputs.force);
    expect((expected as number[]).map((from) => force(from - 0.01))).toEqual(
      (inputs.force as number[]).map((b) => b - 1),
    );
  });

  published('beaufort-formula', ({ inputs, expected, tolerance }) => {
    expectAll(
      (inputs.B as number[]).map((b) => 0.836 * b ** 1.5),
      expected,
      tolerance,
    );
    expect((expected as number[]).map(force)).toEqual(inputs.B);
  });

  published('crane-wind-limits', ({ expected }) => {
    const kmh = (speedMs: number) => wind.compute({ speedMs, areaM2: 1 }).speedKmh;
    expectNear(kmh(expected.Qld_operating_m_s), expected.Qld_km_h, 0);
    expectNear(kmh(expected.AS1418_4_m_s), expected.AS1418_4_km_h, 0);
  });
});

/** Two legs, each at this angle from level. */
const pair = (fromLevelDeg: number, loadKg = 1000) =>
  sling.compute({ loadKg, legs: 2, angleBetweenLegsDeg: 180 - 2 * fromLevelDeg });

describe('Slings', () => {
  published('sling-tension-factor', ({ inputs, expected, tolerance }) => {
    const tensions = (inputs.angle_from_horizontal as number[]).map(
      (angle) => pair(angle).legTensionKg / 500,
    );
    expectAll(tensions, expected, tolerance);
  });

  published('sling-reduction-factor', ({ inputs, expected, tolerance }) => {
    expectAll(
      (inputs.angle_from_horizontal as number[]).map((angle) => pair(angle).factor / 2),
      expected,
      tolerance,
    );
  });

  published('sling-included-angle', ({ inputs, expected, tolerance }) => {
    const results = (inputs.included as number[]).map((angleBetweenLegsDeg) =>
      sling.compute({ loadKg: 1000, legs: 2, angleBetweenLegsDeg }),
    );
    expectAll(
      results.map(({ legTensionKg }) => legTensionKg / 500),
      expected.tension,
      tolerance.tension,
    );
    expectAll(
      results.map(({ factor }) => factor * 50),
      expected.pct,
      tolerance.pct,
    );
  });

  published('sling-two-leg-load-factor', ({ inputs, expected, tolerance }) => {
    const factors = (inputs.included as number[]).map(
      (angleBetweenLegsDeg) => sling.compute({ loadKg: 1, legs: 2, angleBetweenLegsDeg }).factor,
    );
    expectAll(factors, expected, tolerance);
  });

  published('sling-example-tf', ({ inputs, expected }) => {
    const fromLevel = (Math.asin(inputs.H_ft / inputs.L_ft) * 180) / Math.PI;
    const { legTensionKg } = pair(fromLevel, inputs.load_lb);
    expectNear(legTensionKg, expected.min_capacity_lb, 0);
    expectNear(legTensionKg / (inputs.load_lb / inputs.legs), expected.TF, 0);
  });

  published('sling-example-rf', ({ inputs, expected, tolerance }) => {
    const fromLevel = (Math.asin(inputs.H_ft / inputs.L_ft) * 180) / Math.PI;
    const reduction = pair(fromLevel).factor / 2;
    expectNear(reduction, expected.RF, tolerance.RF);
    expectNear(inputs.rating_lb * reduction, expected.capacity_lb, tolerance.capacity_lb);
  });

  published('sling-hitches-500', ({ inputs, expected, tolerance }) => {
    // A basket hitch pulls as two legs; the choke hitch is left to the sling's tag.
    for (const angle of [90, 60, 45, 30])
      expectNear(pair(angle).factor * inputs.vertical_WLL, expected[`basket${angle}`], tolerance);
  });

  published('mode-factors', ({ expected }) => {
    const widest = (angleBetweenLegsDeg: number) =>
      sling.compute({ loadKg: 1, legs: 2, angleBetweenLegsDeg }).factor;
    // The printed factor of a range is that of its widest angle, cut to one decimal.
    expect(Math.floor(widest(90) * 10) / 10).toBe(expected.two_leg_0_90);
    expectNear(widest(120), expected.two_leg_90_120, 0);
    expect(sling.compute({ loadKg: 1, legs: 1 }).factor).toBe(expected.single);
  });

  published('chain-3-4-leg', ({ inputs, expected }) => {
    (inputs.beta as number[]).forEach((fromPlumbDeg, i) => {
      const counted = sling.compute({ loadKg: 1, legs: 4, angleBetweenLegsDeg: 2 * fromPlumbDeg });
      // Counted as two, a four-leg sling is always rated below the published three.
      expect(counted.factor).toBeLessThan(expected[i]);
      expect(counted.legsCounted).toBe(2);
      expect(counted.warnings.join(' ')).toContain('counted as two');
    });
  });

  published('cog-share-8-2', ({ inputs, expected }) => {
    const { nearKg, farKg } = loadShare.compute({ loadKg: inputs.W, nearM: inputs.D2, farM: inputs.D1 });
    expect(nearKg).toBe(expected.sling2);
    expect(farKg).toBe(expected.sling1);
  });
});
