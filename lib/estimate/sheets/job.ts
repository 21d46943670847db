import { input, lines, type SheetDeclaration } from '../declare'

export const currencies = ['USD', 'EUR', 'GBP', 'CAD', 'AUD', 'NZD', 'CHF', 'SEK', 'NOK', 'DKK'] as const
export const uses = ['three-season', 'four-season', 'heated', 'attached to a dwelling'] as const

export const job: SheetDeclaration = {
  id: 'job',
  name: 'Job',
  kind: 'step',
  about: 'Who it is for, where it stands and what it will be used for.',
  blocks: [
    lines(
      input({ name: 'job_title', label: 'Job', quantity: 'text', source: 'firm’s own' }),
      input({ name: 'client_name', label: 'Client', quantity: 'text', source: 'firm’s own' }),
      input({ name: 'site_address', label: 'Site', quantity: 'text', source: 'firm’s own' }),
      input({ name: 'job_date', label: 'Date', quantity: 'date', source: 'firm’s own' }),
      input({
        name: 'house_use',
        label: 'Use',
        quantity: 'text',
        value: 'four-season',
        choices: uses,
        source: 'firm’s own',
      }),
      {
        kind: 'constant',
        name: 'unit_system',
        label: 'Unit system',
        quantity: 'text',
        value: 'us',
        source: 'the workbook’s own',
        note: 'us or si; it changes when the whole workbook is converted, not by typing here.',
      },
      input({
        name: 'currency',
        label: 'Currency',
        quantity: 'text',
        value: 'USD',
        choices: currencies,
        source: 'ISO 4217',
      }),
    ),
  ],
}
