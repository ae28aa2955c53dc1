import { createElement } from 'react'
import { renderToString } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { freshDesign } from '../../src/state/fresh'
import { useDesign } from '../../src/state/useDesign'

function Title() {
  const title = useDesign((state) => state.design.title)
  return createElement('h1', null, title)
}

describe('useDesign', () => {
  it('gives a component the part of the state it selects', () => {
    expect(renderToString(createElement(Title))).toBe(`<h1>${freshDesign.title}</h1>`)
  })
})
