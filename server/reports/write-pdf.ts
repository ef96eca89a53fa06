import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import pdfmake from 'pdfmake'
import type { TDocumentDefinitions } from 'pdfmake/interfaces.js'

const folder = join(dirname(createRequire(import.meta.url).resolve('pdfmake/package.json')), 'fonts', 'Roboto')
const font = (name: string) => join(folder, `Roboto-${name}.ttf`)

pdfmake.setFonts({
  Roboto: {
    normal: font('Regular'),
    bold: font('Medium'),
    italics: font('Italic'),
    bolditalics: font('MediumItalic'),
  },
})
// A document opens its own fonts, no address and no other file, whatever somebody wrote into a name.
pdfmake.setUrlAccessPolicy(() => false)
pdfmake.setLocalAccessPolicy((path) => path.startsWith(folder))

export const writePdf = (definition: TDocumentDefinitions): Promise<Uint8Array> =>
  pdfmake.createPdf(definition).getBuffer()
