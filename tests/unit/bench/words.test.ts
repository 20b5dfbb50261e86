import { describe, expect, it } from 'vitest'
import { actWords, takeBackWords } from '#shared/bench/act-words'
import { clockWords, countInLetters, durationWords, piecesLabel, piecesWords } from '#shared/bench/piece-words'
import { nextWords, stepLine, stepTitle } from '#shared/bench/step-words'
import { id, PERCH, planOf } from './finish'

const { steps } = planOf(PERCH, 6)

describe('words of the bench', () => {
  it('name pieces as one would say them', () => {
    expect([[8], [8, 9], [7, 1, 2, 3, 8, 11]].map(piecesWords)).toEqual(['8', '8 and 9', '1 to 3, 7, 8 and 11'])
    expect([[8], [1, 2, 3, 6]].map(piecesLabel)).toEqual(['piece 8', 'pieces 1–3, 6'])
    expect([4, 12, 13].map(countInLetters)).toEqual(['four', 'twelve', '13'])
  })

  it('name lengths of time', () => {
    expect([40, 360, 5400, 28_800, 259_200].map(durationWords)).toEqual(['40 seconds', '6 minutes', '1 hour 30 minutes', '8 hours', '3 days'])
    expect([130_000, 1, 0, 3_900_000].map(clockWords)).toEqual(['2:10', '0:01', '0:00', '1:05:00'])
  })

  it('say each step as its plate does', () => {
    expect(steps.map(step => stepTitle(step, 6))).toEqual([
      'Make ready', 'Mix for 6 pieces', 'Lay coat 1', 'Rest 6 minutes', 'Clean out', 'Fit the mesh', 'Mix for 6 pieces', 'Lay coat 2', 'Rest 5 minutes',
      'Clean out', 'Lift the mesh', 'Mix for 6 pieces', 'Lay coat 3', 'Rest 10 minutes', 'Heat-set 40 seconds', 'Clean out', 'Set the eyes',
      'Mix for 6 pieces', 'Clear, coat 4', 'Turn 8 hours', 'Inspect',
    ])
    expect(stepLine(steps.find(step => step.id === `lay:${id('coat', 2)}`)!)).toBe('Coat 2, through Mask 1')
    expect(steps.map(nextWords).slice(1, 6)).toEqual(['mix coat 1', 'lay coat 1', 'rest 6 min', 'clean out', 'fit the mesh'])
  })

  it('say what a take-back undoes and what a log holds', () => {
    expect(takeBackWords({ v: 1, kind: 'pass-laid', coatId: id('coat', 1), pieces: [8], passes: 1 }, steps)).toBe('pass on 8')
    expect(takeBackWords({ v: 1, kind: 'step-done', stepId: `lay:${id('coat', 1)}` }, steps)).toBe('to lay coat 1')
    expect(actWords({ v: 1, kind: 'pass-laid', coatId: id('coat', 2), pieces: [1, 2], passes: 2 }, steps)).toBe('2 passes of coat 2 on pieces 1–2')
    expect(actWords({ v: 1, kind: 'inspected', pieces: [3], passed: false, note: 'dust' }, steps)).toBe('Piece 3 failed: dust')
  })
})
