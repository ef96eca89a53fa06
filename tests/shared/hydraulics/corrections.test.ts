import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { WantedCorrection } from '#shared/hydraulics/corrections/catalogue.ts'
import { correctReadings } from '#shared/hydraulics/corrections/correct-readings.ts'
import { undone, type Efficiency, type Outside, type Readings } from '#shared/hydraulics/corrections/correction.ts'
import { tidalFrequency, tidalSpeeds } from '#shared/hydraulics/corrections/tides.ts'
import together from '../../reference/corrections.json'
import reference from '../../reference/test-kinds.json'
import { DAY, relative } from './make-inputs.ts'

const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)
const { antecedent } = reference
const HOUR = 3600

/** Hourly readings from `before` days before pumping to `test` days after its start. */
function makeReadings(before: number, test: number, drawdown: (time: number) => number): Readings {
  const elapsed_s = Array.from({ length: (before + test) * 24 + 1 }, (_, i) => (i - before * 24) * HOUR)
  return { elapsed_s, drawdown_m: elapsed_s.map(drawdown) }
}

const pumping = (time: number) => (time > 0 ? 0.8 * Math.log10(1 + time / 60) : 0)
const stage = (time: number) => 2 + 0.5 * Math.sin(time / 40_000) + 0.2 * Math.cos(time / 90_000)
const stageSeries = (from: number, to: number) => {
  const elapsed_s = Array.from({ length: (to - from) * 96 + 1 }, (_, i) => from * DAY + i * 900)
  return { elapsed_s, value_m: elapsed_s.map(stage) }
}

/** One correction alone, with what is left. */
function only(readings: Readings, wanted: WantedCorrection) {
  const { drawdown_m, corrections } = correctReadings(readings, [wanted])
  return { corrected_m: drawdown_m, ...corrections[0]! }
}
const removeTrend = (readings: Readings) => only(readings, { kind: 'trend', slope_m_s: null })
const removeTides = (readings: Readings) => only(readings, { kind: 'tides' })
const removeBarometric = (readings: Readings, outside: Outside, efficiency: Efficiency) =>
  only(readings, { kind: 'barometric', outside, efficiency })
const removeRiverStage = (readings: Readings, outside: Outside, efficiency: Efficiency) =>
  only(readings, { kind: 'river', outside, efficiency })

describe('causes that are learned together', () => {
  it('need more readings before pumping than there are figures to find', () => {
    const outside = stageSeries(-2, 2)
    const moved = outside.value_m.map((value, i) => value + Math.sin(i / 7))
    const turned = outside.value_m.map((value, i) => value + Math.cos(i / 11))
    const efficiency = { longestLag_s: 0, lagStep_s: HOUR }
    const wanted: WantedCorrection[] = [
      { kind: 'barometric', outside, efficiency },
      { kind: 'river', outside: { ...outside, value_m: moved }, efficiency },
      { kind: 'gauge', outside: { ...outside, value_m: turned }, efficiency },
      { kind: 'tides' },
    ]
    const after = (count: number) => {
      const elapsed_s = [...Array.from({ length: count }, (_, i) => (i - count) * HOUR), HOUR]
      return correctReadings({ elapsed_s, drawdown_m: elapsed_s.map((time) => 0.01 * Math.sin(time)) }, wanted)
    }
    expect(() => after(8)).toThrow('analysis/correction-readings')
    after(9).corrections.forEach(({ record }) => expect(Object.values(record).every(Number.isFinite)).toBe(true))
  })
})

describe('an antecedent trend', () => {
  it('is taken off the whole record, and leaves the drawdown of pumping', () => {
    const readings = makeReadings(5, 3, (time) => pumping(time) + 0.3 + 2e-7 * time)
    const correction = removeTrend(readings)
    correction.corrected_m.forEach((value, i) =>
      expect(value).toBeCloseTo(pumping(readings.elapsed_s[i] as number), 10),
    )
    expect(relative(correction.record.slope_m_s as number, 2e-7)).toBeLessThan(1e-9)
    expect(codes(correction)).toEqual([])
  })

  it('warns of a record shorter than the test, and refuses one of two readings', () => {
    expect(codes(removeTrend(makeReadings(1, 3, (time) => 1e-7 * time)))).toContain('antecedent-short')
    expect(() => removeTrend({ elapsed_s: [-2, -1, 5], drawdown_m: [0, 0, 1] })).toThrow('analysis/correction-readings')
    expect(() => removeTrend({ elapsed_s: [-2], drawdown_m: [] })).toThrow('analysis/uneven-series')
  })
})

describe('air pressure', () => {
  const readings = { elapsed_s: antecedent.t, drawdown_m: antecedent.level }
  const pressure = { elapsed_s: antecedent.t, value_m: antecedent.pressure }
  const within = {
    elapsed_s: antecedent.t.filter((time) => time >= antecedent.from),
    drawdown_m: antecedent.level.filter((_, i) => (antecedent.t[i] as number) >= antecedent.from),
  }
  const learn = { longestLag_s: 6 * HOUR, lagStep_s: HOUR }

  it('has the efficiency and lag that numpy finds beside a trend, near the truth of 0.45 and 2 h', () => {
    const { record, findings } = removeBarometric(within, pressure, learn)
    expect(record.lag_s).toBe(2 * HOUR)
    expect(relative(record.efficiency as number, antecedent.efficiency)).toBeLessThan(1e-9)
    expect(relative(record.efficiency as number, 0.45)).toBeLessThan(0.01)
    expect(record.explained).toBeGreaterThan(0.95)
    expect(findings).toEqual([])
  })

  it('may be given, adds to drawdown where it rises, and is zero when pumping begins', () => {
    const correction = removeBarometric(readings, pressure, { given: 0.5, lag_s: 0 })
    const start = antecedent.t.indexOf(0)
    expect(correction.effect_m[start]).toBeCloseTo(0, 12)
    const rise = (antecedent.pressure[start + 50] as number) - (antecedent.pressure[start] as number)
    expect(correction.effect_m[start + 50]).toBeCloseTo(0.5 * rise, 12)
  })

  it('needs a series that covers the readings and moves, and enough readings', () => {
    expect(() => removeBarometric(readings, pressure, learn)).toThrow('analysis/correction-cover')
    const level = { elapsed_s: antecedent.t, value_m: antecedent.t.map(() => 10) }
    expect(() => removeBarometric(within, level, learn)).toThrow('analysis/correction-level')
    expect(() => removeBarometric(within, pressure, { longestLag_s: 0, lagStep_s: 0 })).toThrow('analysis/bad-option')
    expect(() => removeBarometric(within, pressure, { given: NaN, lag_s: 0 })).toThrow('analysis/bad-option')
    const few = { elapsed_s: [-HOUR, 0, HOUR], drawdown_m: [0, 0, 1] }
    expect(() => removeBarometric(few, pressure, { longestLag_s: 0, lagStep_s: HOUR })).toThrow(
      'analysis/correction-readings',
    )
  })

  it('says that an efficiency is odd, a lag the longest tried, and a correction weak', () => {
    expect(codes(removeBarometric(readings, pressure, { given: 1.4, lag_s: 0 }))).toContain('correction-odd')
    expect(codes(removeBarometric(within, pressure, { longestLag_s: HOUR, lagStep_s: HOUR }))).toContain('lag-at-end')
    const noise = { ...within, drawdown_m: within.elapsed_s.map((_, i) => Math.sin(i * i)) }
    expect(codes(removeBarometric(noise, pressure, learn))).toContain('correction-weak')
  })
})

describe('a river', () => {
  it('lifts the level later and less, and is taken off to leave the drawdown of pumping', () => {
    const lag = 3 * HOUR
    const readings = makeReadings(8, 5, (time) => pumping(time) - 0.35 * (stage(time - lag) - stage(-lag)))
    const correction = removeRiverStage(readings, stageSeries(-9, 6), { longestLag_s: 12 * HOUR, lagStep_s: HOUR })
    expect(correction.record.lag_s).toBe(lag)
    expect(relative(correction.record.efficiency as number, 0.35)).toBeLessThan(1e-4)
    correction.corrected_m.forEach((value, i) => expect(value).toBeCloseTo(pumping(readings.elapsed_s[i] as number), 4))
  })

  it('given with its lag gives the same as learned', () => {
    const readings = makeReadings(8, 5, (time) => pumping(time) - 0.35 * (stage(time - HOUR) - stage(-HOUR)))
    const learned = removeRiverStage(readings, stageSeries(-9, 6), { longestLag_s: 2 * HOUR, lagStep_s: HOUR })
    const given = removeRiverStage(readings, stageSeries(-9, 6), {
      given: learned.record.efficiency as number,
      lag_s: learned.record.lag_s as number,
    })
    expect(given.corrected_m).toEqual(learned.corrected_m)
  })
})

describe('tides', () => {
  it('have the amplitudes that numpy finds in thirty days, near the truth', () => {
    const { record, findings } = removeTides({ elapsed_s: antecedent.t, drawdown_m: antecedent.tidal })
    for (const id of Object.keys(tidalSpeeds) as (keyof typeof tidalSpeeds)[]) {
      expect(relative(record[`${id}_amplitude_m`] as number, antecedent.amplitudes[id])).toBeLessThan(1e-8)
      expect(relative(record[`${id}_amplitude_m`] as number, antecedent.truth[id])).toBeLessThan(0.02)
    }
    expect(findings).toEqual([])
  })

  it('have the periods of the printed lists: M2 12.4206 h, N2 12.6583 h, K1 23.9345 h, O1 25.8193 h', () => {
    const hours = (id: keyof typeof tidalSpeeds) => (2 * Math.PI) / tidalFrequency(id) / HOUR
    expect(hours('M2')).toBeCloseTo(12.4206, 4)
    expect(hours('S2')).toBeCloseTo(12, 10)
    expect(hours('N2')).toBeCloseTo(12.6583, 4)
    expect(hours('K1')).toBeCloseTo(23.9345, 4)
    expect(hours('O1')).toBeCloseTo(25.8193, 4)
  })

  it('are carried through pumping, whose drawdown is left', () => {
    const tide = (time: number) =>
      0.1 * Math.cos(tidalFrequency('M2') * time - 1) + 0.05 * Math.sin(tidalFrequency('K1') * time)
    const readings = makeReadings(30, 10, (time) => pumping(time) + tide(time))
    const { corrected_m } = removeTides(readings)
    corrected_m.forEach((value, i) => expect(value).toBeCloseTo(pumping(readings.elapsed_s[i] as number), 8))
  })

  it('that a short record cannot tell apart are fitted by the larger', () => {
    const readings = makeReadings(5, 3, (time) => 0.1 * Math.cos(tidalFrequency('M2') * time))
    const correction = removeTides(readings)
    const apart = correction.findings
      .filter(({ code }) => code === 'tides-inseparable')
      .map(({ params }) => params.other)
    expect(apart).toEqual(['O1', 'S2', 'N2'])
    expect(relative(correction.record.M2_amplitude_m as number, 0.1)).toBeLessThan(1e-6)
  })
})

describe('every correction', () => {
  it('is undone exactly: corrected and effect give the reading back', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 120, maxLength: 120 }),
        (values) => {
          const readings = { elapsed_s: values.map((_, i) => (i - 80) * HOUR), drawdown_m: values }
          const outside = stageSeries(-9, 6)
          const wanted: WantedCorrection[] = [
            { kind: 'trend', slope_m_s: null },
            { kind: 'tides' },
            { kind: 'river', outside, efficiency: { longestLag_s: HOUR, lagStep_s: HOUR } },
            { kind: 'barometric', outside, efficiency: { given: 0.4, lag_s: 0 } },
          ]
          for (const some of [...wanted.map((one) => [one]), wanted]) {
            const corrected = correctReadings(readings, some, { meanBefore: true })
            undone(corrected).forEach((value, i) => expect(Math.abs(value - (values[i] as number))).toBeLessThan(1e-9))
          }
        },
      ),
      { numRuns: 20 },
    )
  })

  it('scales with the unit of length, and does not with that of time', () => {
    const [foot, minute] = [0.3048, 60]
    const readings = makeReadings(8, 5, (time) => pumping(time) + 1e-7 * time - 0.35 * (stage(time) - stage(0)))
    const imperial = {
      elapsed_s: readings.elapsed_s.map((time) => time / minute),
      drawdown_m: readings.drawdown_m.map((value) => value / foot),
    }
    const outside = stageSeries(-9, 6)
    const scaledOutside = {
      elapsed_s: outside.elapsed_s.map((time) => time / minute),
      value_m: outside.value_m.map((value) => value / foot),
    }
    const a = removeRiverStage(readings, outside, { longestLag_s: 2 * HOUR, lagStep_s: HOUR })
    const b = removeRiverStage(imperial, scaledOutside, { longestLag_s: 120, lagStep_s: 60 })
    b.corrected_m.forEach((value, i) => expect(value * foot).toBeCloseTo(a.corrected_m[i] as number, 9))
  })
})

describe('several corrections', () => {
  const { t, level, pressure, stage: river, found } = together
  const readings = { elapsed_s: t, drawdown_m: level }
  const learned = { longestLag_s: 0, lagStep_s: HOUR }
  const wanted: WantedCorrection[] = [
    { kind: 'trend', slope_m_s: null },
    { kind: 'barometric', outside: { elapsed_s: t, value_m: pressure }, efficiency: learned },
    { kind: 'river', outside: { elapsed_s: t, value_m: river }, efficiency: learned },
    { kind: 'tides' },
  ]

  it('are learned together, as scipy does by one least squares, with its standard errors for white noise', () => {
    const { corrections } = correctReadings(readings, wanted)
    const record = Object.fromEntries(corrections.map((one) => [one.kind, one.record]))
    expect(relative(record.trend!.slope_m_s!, found.slope)).toBeLessThan(1e-7)
    expect(relative(record.barometric!.efficiency!, found.barometric)).toBeLessThan(1e-7)
    expect(relative(record.river!.efficiency!, found.river)).toBeLessThan(1e-7)
    expect(relative(record.tides!.M2_amplitude_m!, found.M2)).toBeLessThan(1e-7)
    // The errors allow for residuals that stray together, and hardly widen where these do not.
    expect(record.barometric!.efficiencySd! / found.barometricSd).toBeGreaterThan(0.9)
    expect(record.barometric!.efficiencySd! / found.barometricSd).toBeLessThan(1.4)
  })

  it('are near the truth where each alone is led astray by the others', () => {
    const efficiencyOf = (some: WantedCorrection[]) =>
      correctReadings(readings, some).corrections.find(({ kind }) => kind === 'barometric')!.record.efficiency!
    expect(Math.abs(efficiencyOf(wanted) - together.truth.barometric)).toBeLessThan(0.01)
    expect(Math.abs(efficiencyOf([wanted[1]!]) - together.truth.barometric)).toBeGreaterThan(0.05)
  })

  it('are refused where two series say the same, and not where one of them is given', () => {
    const outside = { elapsed_s: t, value_m: pressure }
    const alike: WantedCorrection[] = [
      { kind: 'barometric', outside, efficiency: learned },
      { kind: 'river', outside, efficiency: learned },
    ]
    expect(() => correctReadings(readings, alike)).toThrow('analysis/correction-alike')
    const given: WantedCorrection = { kind: 'river', outside, efficiency: { given: 0.2, lag_s: 0 } }
    expect(correctReadings(readings, [alike[0]!, given]).corrections).toHaveLength(2)
  })

  it('leave the mean before pumping at zero where the static level is that mean', () => {
    const { drawdown_m } = correctReadings(readings, [wanted[1]!], { meanBefore: true })
    const before = drawdown_m.filter((_, i) => t[i]! <= 0)
    expect(Math.abs(before.reduce((sum, value) => sum + value, 0) / before.length)).toBeLessThan(1e-12)
  })

  it('learn nothing from readings that are left out, and need no series there', () => {
    const included = t.map((time) => time >= -10 * DAY)
    const spoilt = level.map((value, i) => (included[i] ? value : 99))
    const from = t.findIndex((time) => time >= -10 * DAY)
    const outside = { elapsed_s: t.slice(from), value_m: pressure.slice(from) }
    const correct = (part: Partial<Readings>) =>
      correctReadings({ ...readings, ...part }, [{ kind: 'barometric', outside, efficiency: learned }])
    const used = correct({ drawdown_m: spoilt, included })
    const cut = correct({ elapsed_s: t.slice(from), drawdown_m: level.slice(from) })
    expect(used.corrections[0]!.record).toEqual(cut.corrections[0]!.record)
    expect(() => correct({})).toThrow('analysis/correction-cover')
  })

  it('warn of a gap in the series that is followed', () => {
    const kept = t.flatMap((time, i) => (time > DAY && time < DAY + 8 * HOUR ? [] : [i]))
    const outside = { elapsed_s: kept.map((i) => t[i]!), value_m: kept.map((i) => pressure[i]!) }
    expect(codes(removeBarometric(readings, outside, learned))).toContain('outside-gap')
    expect(codes(removeBarometric(readings, { elapsed_s: t, value_m: pressure }, learned))).not.toContain('outside-gap')
  })
})
