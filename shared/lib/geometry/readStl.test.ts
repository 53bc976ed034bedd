import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { asciiStl, box, soupOf, tetrahedron } from '../../../fixtures/reference/solids'
import { readStl } from './readStl'
import { writeStl } from './writeStl'

const text = (content: string): Uint8Array => new TextEncoder().encode(content)
const facet = (corners = '0 0 0 1 0 0 0 1 0'): string => {
  const [a, b, c, d, e, f, g, h, i] = corners.split(' ')
  return `facet normal 0 0 1\nouter loop\nvertex ${a} ${b} ${c}\nvertex ${d} ${e} ${f}\nvertex ${g} ${h} ${i}\nendloop\nendfacet\n`
}
const corners = (bytes: Uint8Array): number[] => {
  const read = readStl(bytes)
  if (!read.ok) throw new Error(read.why)
  return [...read.positions]
}

describe('binary', () => {
  const whole = writeStl(box(2, 3, 4))

  test('gives the corners in the order of the file', () => {
    const read = readStl(whole)
    expect(read).toMatchObject({ ok: true, kind: 'binary', facets: 12 })
    expect(corners(whole)).toEqual([...soupOf(box(2, 3, 4))])
  })

  test('is known by its length though its header begins with "solid"', () => {
    expect(readStl(writeStl(box(2, 3, 4), 'solid part'))).toMatchObject({
      ok: true,
      kind: 'binary',
      facets: 12,
    })
  })

  test('is read at an odd place in a larger buffer, where words are not aligned', () => {
    const larger = new Uint8Array(whole.length + 1)
    larger.set(whole, 1)
    expect(corners(larger.subarray(1))).toEqual(corners(whole))
  })

  test('ignores bytes after the promised facets', () => {
    const longer = new Uint8Array(whole.length + 33)
    longer.set(whole)
    expect(readStl(longer)).toMatchObject({ ok: true, facets: 12 })
  })

  test('that breaks off says how many facets were promised and how many are there', () => {
    expect(readStl(whole.subarray(0, 84 + 50 * 7 + 20))).toEqual({
      ok: false,
      why: 'truncated',
      promised: 12,
      present: 7,
    })
    expect(readStl(writeStl(box(1, 1, 1), 'solid x').subarray(0, 300))).toMatchObject({
      why: 'truncated',
      promised: 12,
    })
  })

  test('without facets is refused', () => {
    expect(readStl(new Uint8Array(84))).toEqual({ ok: false, why: 'no-facets' })
  })

  test.each([NaN, Infinity, -Infinity])('with a corner at %d names the facet', (wrong) => {
    const bytes = whole.slice()
    new DataView(bytes.buffer).setFloat32(84 + 50 * 4 + 12 + 20, wrong, true)
    expect(readStl(bytes)).toEqual({ ok: false, why: 'not-finite', facet: 5 })
  })

  test('with a wrong normal is read, since the corners say the same', () => {
    const bytes = whole.slice()
    new DataView(bytes.buffer).setFloat32(84, NaN, true)
    expect(readStl(bytes).ok).toBe(true)
  })

  test('of more facets than allowed is refused by its header', () => {
    expect(readStl(whole, { mostFacets: 11 })).toEqual({ ok: false, why: 'too-many', facets: 12, limit: 11 })
    expect(readStl(whole, { mostFacets: 12 }).ok).toBe(true)
  })
})

describe('text', () => {
  test('gives the same corners as the binary file of the same solid', () => {
    const solid = tetrahedron(10)
    expect(corners(text(asciiStl(solid)))).toEqual(corners(writeStl(solid)))
  })

  test.each([
    ['capitals', `SOLID A\n${facet().toUpperCase()}ENDSOLID A`],
    ['CRLF', `solid a\n${facet()}endsolid a\n`.replaceAll('\n', '\r\n')],
    ['one line end in three', `solid a\n${facet().replaceAll('\n', '  \t ')}\nendsolid`],
    ['a byte order mark and white space in front', `\uFEFF \n\n solid a\n${facet()}endsolid a`],
    ['no name', `solid\n${facet()}endsolid`],
    ['a name of keywords', `solid facet vertex 1 2 3 endsolid\n${facet()}endsolid facet vertex`],
    ['NaN in the normal', `solid a\n${facet().replace('0 0 1', 'nan nan nan')}endsolid`],
  ])('with %s is read', (_, content) => {
    expect(corners(text(content))).toEqual([0, 0, 0, 1, 0, 0, 0, 1, 0])
  })

  test('with several solids is read as one', () => {
    expect(
      readStl(text(`solid a\n${facet()}endsolid a\nsolid b\n${facet()}${facet()}endsolid b\n`)),
    ).toMatchObject({
      ok: true,
      kind: 'ascii',
      facets: 3,
    })
  })

  test.each([
    ['1e2', 100],
    ['-1.5E-003', -0.0015],
    ['+.25', 0.25],
    ['7.', 7],
    ['-0', -0],
    ['0.1000000000000000055511151231257827', 0.1],
    ['123456789012345678', 123456789012345678],
    ['1e-46', 0],
  ])('reads the number %s', (written, value) => {
    const [first] = corners(text(`solid a\n${facet(`${written} 0 0 1 0 0 0 1 0`)}endsolid`))
    expect(first).toBe(Math.fround(value))
  })

  test('numbers are read as the language reads them', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.float({ noNaN: true, noDefaultInfinity: true }).map(String),
          fc.double({ noNaN: true, min: -1e30, max: 1e30 }).map(String),
          fc.float({ noNaN: true, noDefaultInfinity: true }).map((value) => value.toExponential(6)),
        ),
        (written) => {
          const [first] = corners(text(`solid a\n${facet(`${written} 0 0 1 0 0 0 1 0`)}endsolid`))
          expect(first).toBe(Math.fround(Number(written)))
        },
      ),
      { seed: 3, numRuns: 500 },
    )
  })

  test.each(['nan', 'NAN', '-nan(ind)', 'inf', '-Infinity', '1.#QNAN', '1e39', '1e400'])(
    'with a corner at %s names the facet',
    (wrong) => {
      const content = `solid a\n${facet()}${facet(`0 ${wrong} 0 1 0 0 0 1 0`)}endsolid`
      expect(readStl(text(content))).toEqual({ ok: false, why: 'not-finite', facet: 2 })
    },
  )

  test.each([
    ['a decimal comma', facet('0 0,5 0 1 0 0 0 1 0'), 4, '0,5'],
    ['a foreign word', `${facet()}color 1 0 0\n`, 9, 'color'],
    ['a facet of four corners', facet().replace('endloop', 'vertex 1 1 0\nendloop'), 7, 'vertex'],
    ['a facet of two corners', facet().replace('vertex 0 1 0\n', ''), 6, 'endloop'],
  ])('with %s names the line', (_, content, line, found) => {
    const outcome = readStl(text(`solid a\n${facet()}${content}endsolid\n`))
    expect(outcome).toEqual({ ok: false, why: 'bad-text', line: line + 7, found })
  })

  test('cut off anywhere after its first facet is refused, never read short', () => {
    const content = asciiStl(box(1, 2, 3))
    const first = content.indexOf('endfacet') + 10
    for (let length = first; length < content.lastIndexOf('endsolid') + 8; length += 7) {
      const outcome = readStl(text(content.slice(0, length)))
      expect(outcome.ok).toBe(false)
      if (!outcome.ok) expect(['truncated', 'bad-text']).toContain(outcome.why)
    }
    expect(readStl(text(content.slice(0, content.length / 2)))).toMatchObject({
      why: 'truncated',
      promised: null,
      present: 6,
    })
  })

  test('without facets is refused', () => {
    expect(readStl(text('solid empty\nendsolid empty\n'))).toEqual({ ok: false, why: 'no-facets' })
  })

  test('of more facets than allowed is refused', () => {
    expect(readStl(text(asciiStl(box(1, 1, 1))), { mostFacets: 11 })).toMatchObject({
      why: 'too-many',
      limit: 11,
    })
  })
})

describe('other files', () => {
  test.each([
    ['nothing', new Uint8Array()],
    [
      'a text',
      text('The parts list of the machine, which is longer than the header of an STL would be. '.repeat(9)),
    ],
    ['prose that begins with "solid"', text('solid wood, planed on four sides\nand oiled')],
    [
      'a PNG',
      Uint8Array.from(
        { length: 4000 },
        (_, at) => [137, 80, 78, 71, 13, 10, 26, 10][at] ?? (at * 7919) % 251,
      ),
    ],
    ['a ZIP', Uint8Array.from({ length: 4000 }, (_, at) => [80, 75, 3, 4][at] ?? (at * 104729) % 256)],
  ])('%s is no STL', (_, bytes) => {
    expect(readStl(bytes)).toEqual({ ok: false, why: 'not-stl' })
  })

  test('never throws, whatever the bytes', () => {
    const header = fc.constantFrom(
      '',
      'solid x\n',
      'solid',
      'solid a\nfacet normal 0 0 1\nouter loop\nvertex ',
    )
    fc.assert(
      fc.property(header, fc.uint8Array({ maxLength: 400 }), (start, rest) => {
        const bytes = new Uint8Array([...text(start), ...rest])
        expect(typeof readStl(bytes, { mostFacets: 1000 }).ok).toBe('boolean')
      }),
      { seed: 1, numRuns: 2000 },
    )
  })

  test('never throws on an STL that was damaged', () => {
    const good = [writeStl(box(1, 2, 3)), text(asciiStl(box(1, 2, 3)))]
    fc.assert(
      fc.property(
        fc.constantFrom(...good),
        fc.array(fc.tuple(fc.nat(), fc.nat(255)), { maxLength: 8 }),
        fc.nat(),
        (bytes, changes, end) => {
          const damaged = bytes.slice(0, end % (bytes.length + 1))
          for (const [at, value] of changes) if (damaged.length > 0) damaged[at % damaged.length] = value
          expect(typeof readStl(damaged).ok).toBe('boolean')
        },
      ),
      { seed: 2, numRuns: 2000 },
    )
  })
})
