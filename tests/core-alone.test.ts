import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join, normalize, sep } from 'node:path'
import ts from 'typescript'
import { describe, expect, it } from 'vitest'

const core = join('src', 'core')

/** Every place a source file imports from, re-exports, dynamic imports and import types included. */
function importsOf(path: string, text: string): readonly string[] {
  const found: string[] = []
  const visit = (node: ts.Node): void => {
    const given =
      ts.isImportDeclaration(node) || ts.isExportDeclaration(node)
        ? node.moduleSpecifier
        : ts.isExternalModuleReference(node)
          ? node.expression
          : ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)
            ? node.argument.literal
            : isLoadingCall(node)
              ? node.arguments[0]
              : undefined
    if (given) found.push(ts.isStringLiteralLike(given) ? given.text : `(${given.getText()})`)
    ts.forEachChild(node, visit)
  }
  visit(ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true))
  return found
}

/** Whether this is `import(…)` or `require(…)`. */
function isLoadingCall(node: ts.Node): node is ts.CallExpression {
  if (!ts.isCallExpression(node)) return false
  const called = node.expression
  return (
    called.kind === ts.SyntaxKind.ImportKeyword ||
    (ts.isIdentifier(called) && called.text === 'require')
  )
}

/** Those of a file's imports that lead out of core. */
function leavingCore(path: string, text: string): readonly string[] {
  return importsOf(path, text).filter(
    (name) => !name.startsWith('.') || !normalize(join(dirname(path), name)).startsWith(core + sep),
  )
}

describe('the core', () => {
  const files = readdirSync(core, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name))
    .map((name) => join(core, name))

  it('is there to be read', () => {
    expect(files).toContain(join(core, 'index.ts'))
    expect(files.flatMap((path) => importsOf(path, readFileSync(path, 'utf8')))).not.toEqual([])
  })

  it.each(files)('imports nothing but itself in %s', (path) => {
    expect(leavingCore(path, readFileSync(path, 'utf8'))).toEqual([])
  })
})

describe('the reading of imports', () => {
  const path = join(core, 'stage', 'example.ts')

  it.each([
    ["import { scaleLinear } from 'd3'", 'd3'],
    ["import type { ReactNode } from 'react'", 'react'],
    ["import 'node:fs'", 'node:fs'],
    ["export * from '../../io/link'", '../../io/link'],
    ["import old = require('old')", 'old'],
    ["const later = import('../../state/store')", '../../state/store'],
    ["const older = require('older')", 'older'],
    ["let node: import('react').ReactNode", 'react'],
    ['const hidden = import(name)', '(name)'],
    ["import { near } from '../../corelike/near'", '../../corelike/near'],
  ])('sees that %s leaves the core', (text, name) => {
    expect(leavingCore(path, text)).toEqual([name])
  })

  it('accepts neighbours within the core', () => {
    expect(leavingCore(path, "import '../quantity/parse'\nexport * from './stage'")).toEqual([])
  })
})
