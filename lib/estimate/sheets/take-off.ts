import {
  area,
  computed,
  type GridColumn,
  type GridRow,
  grid,
  heading,
  input,
  lines,
  lookUp,
  type SheetDeclaration,
} from '../declare'
import { surfaceNames } from './surfaces'

const of = (column: string): string => lookUp('coverings', '[Covering]', column)
const whole = (quotient: string): string => `ROUNDUP(ROUND(${quotient},9),0)`

const columns: readonly GridColumn[] = [
  { title: 'Surface', quantity: 'text', formula: '={surface_name}', width: 230 },
  { title: 'Covering', quantity: 'text', formula: '={surface_covering}', width: 130 },
  {
    title: 'Part',
    quantity: 'text',
    formula: '={surface_part}',
    named: area('take_off_part', 'parts of the house, in the take-off'),
  },
  { title: 'Overhang', quantity: 'length', formula: '=0' },
  { title: 'Cut length', quantity: 'length', formula: '={surface_flute_length}-knee_wall_height' },
  {
    title: 'Piece',
    quantity: 'length',
    formula: '=[Cut length]+[Overhang]',
    named: area('sheet_cut_length', 'longest piece of each surface'),
  },
  {
    title: 'Area needed',
    quantity: 'area',
    formula: '={surface_net_area}+{surface_width}*[Overhang]*{surface_count}',
    named: area('needed_area', 'sheet areas needed, overhang included'),
  },
  { title: 'Sheet', quantity: 'text', ground: 'table', formula: `=${of('stock sheet')}`, width: 130 },
  {
    title: 'Sheet width',
    quantity: 'length',
    ground: 'table',
    formula: `=${lookUp('sheets_in_stock', '[Sheet]', 'width')}`,
  },
  {
    title: 'Sheet length',
    quantity: 'length',
    ground: 'table',
    formula: `=${lookUp('sheets_in_stock', '[Sheet]', 'length')}`,
  },
  {
    title: 'Sheets',
    quantity: 'count',
    formula: `=IF([Sheet width]*[Sheet length]=0,0,${whole('SUMIFS([first:Area needed],[first:Sheet],[Sheet])*(1+waste_allowance)/([Sheet width]*[Sheet length])')}-SUMIFS([above:Sheets],[above:Sheet],[Sheet]))`,
    named: area('needed_sheets', 'sheets to buy for each surface'),
  },
  {
    title: 'Area bought',
    quantity: 'area',
    formula:
      '=IF([Sheet width]*[Sheet length]=0,[Area needed]*(1+waste_allowance),[Sheets]*[Sheet width]*[Sheet length])',
    named: area('bought_area', 'sheet areas bought'),
  },
  {
    title: 'Bought',
    quantity: 'number',
    formula: '=IF([Sheet width]*[Sheet length]=0,[Area bought],[Sheets])',
    named: area('bought_quantity', 'sheets bought, or the area where it is cut to size'),
  },
  {
    title: 'Bought in',
    quantity: 'text',
    formula: '=IF([Sheet width]*[Sheet length]=0,IF(unit_system="us","ft²","m²"),"sheets")',
    named: area('bought_unit', 'what is bought is counted in'),
  },
  {
    title: 'Weight',
    quantity: 'mass',
    formula: `=[Area bought]*${of('weight')}`,
    named: area('bought_weight', 'weights bought'),
  },
  {
    title: 'Carried',
    quantity: 'length',
    formula: `=IF(OR([Area needed]=0,${of('bending')}="freely"),0,IF([Sheet length]=0,[Piece],[Sheet length]))`,
    source: 'length on the lorry; film goes in rolls',
    named: area('carried_length', 'lengths that are carried'),
  },
  { title: 'Joint profile', quantity: 'text', ground: 'table', formula: `=${of('joint profile')}` },
  {
    title: 'Joints',
    quantity: 'length',
    formula: `=IF(OR([Joint profile]="NONE",[Sheet width]=0,{surface_width}=0),0,(${whole('{surface_width}/[Sheet width]')}-1)*[Piece]*{surface_count})`,
    named: area('needed_joints', 'joint lengths'),
  },
  { title: 'End profile', quantity: 'text', ground: 'table', formula: `=${of('end profile')}` },
  {
    title: 'Open ends',
    quantity: 'length',
    formula: '=IF([End profile]="NONE",0,2*{surface_width}*{surface_count})',
    named: area('needed_ends', 'end profile lengths'),
  },
  { title: 'Fixing', quantity: 'text', ground: 'table', formula: `=${of('fixing')}` },
  {
    title: 'Fixings',
    quantity: 'count',
    formula: `=IF(OR([Fixing]="NONE",[Area needed]=0),0,(${whole('[Piece]/purlin_spacing')}+1)*(${whole('{surface_width}/fixing_spacing')}+1)*{surface_count})`,
    named: area('needed_fixings', 'fixings'),
  },
  {
    title: 'Joint price',
    quantity: 'money-per-length',
    ground: 'table',
    formula: `=${lookUp('profiles', '[Joint profile]', 'price')}`,
    named: area('joint_prices', 'prices of the joint profiles'),
  },
  {
    title: 'End price',
    quantity: 'money-per-length',
    ground: 'table',
    formula: `=${lookUp('profiles', '[End profile]', 'price')}`,
    named: area('end_prices', 'prices of the end profiles'),
  },
  {
    title: 'Fixing price',
    quantity: 'money',
    ground: 'table',
    formula: `=${lookUp('fixings', '[Fixing]', 'price')}`,
    named: area('fixing_prices', 'prices of the fixings'),
  },
  {
    title: 'Sheet price',
    quantity: 'money',
    ground: 'table',
    formula: `=IF([Sheet width]*[Sheet length]=0,${of('price')},${lookUp('sheets_in_stock', '[Sheet]', 'price')})`,
    named: area('sheet_prices', 'prices of a sheet, or of its area where it is cut to size'),
  },
]

const slantedTop =
  '=IF([End profile]="NONE",0,({surface_width}+IF(OR(frame_type="lean-to",frame_type="single-slope"),1,2)*half_roof_length)*{surface_count})'
const own: Record<string, GridRow> = {
  'Front roof': { Overhang: '=overhang', 'Cut length': '={surface_flute_length}' },
  'Back roof': { Overhang: '=overhang', 'Cut length': '={surface_flute_length}' },
  'Arch roof': { Overhang: '=2*overhang', 'Cut length': '={surface_flute_length}' },
  'Left end': { 'Open ends': slantedTop },
  'Right end': { 'Open ends': slantedTop },
}

/**
 * T0 Whole sheets are bought of each stock sheet: area with overhang and waste over the sheet's area, rounded up once
 * over all the surfaces that share it. Where no sheet is stocked, the area with waste is bought.
 */
export const takeOff: SheetDeclaration = {
  id: 'take-off',
  name: 'Take-off',
  kind: 'step',
  about: 'What has to be bought: sheets by area, joints and ends by length, fixings by count.',
  blocks: [
    grid({
      columns,
      rows: surfaceNames.map((surface) => own[surface] ?? {}),
    }),
    lines(
      heading('Rules'),
      input({
        name: 'waste_allowance',
        label: 'Waste allowance',
        quantity: 'ratio',
        value: 0.1,
        limits: { min: 0, max: 1 },
        source: 'common practice, no source',
        note: 'Added to the area needed before sheets are counted.',
      }),
      input({
        name: 'fixing_spacing',
        label: 'Fixing spacing along a purlin',
        quantity: 'length',
        value: 1,
        limits: { above: 0, max: 1000, in: 'si' },
        source: 'from memory: screws at 300 to 500 mm',
      }),
      heading('Needed and bought'),
      computed({
        name: 'sheet_count',
        label: 'Sheets',
        quantity: 'count',
        formula: '=SUM(needed_sheets)',
        source: 'take-off',
        total: true,
      }),
      computed({
        name: 'joint_length',
        label: 'Joint length',
        quantity: 'length',
        formula: '=SUM(needed_joints)',
        source: 'take-off',
      }),
      computed({
        name: 'end_profile_length',
        label: 'End profile length',
        quantity: 'length',
        formula: '=SUM(needed_ends)',
        source: 'take-off',
      }),
      computed({
        name: 'fixing_count',
        label: 'Fixings',
        quantity: 'count',
        formula: '=SUM(needed_fixings)',
        source: 'take-off',
      }),
      computed({
        name: 'sheet_area_needed',
        label: 'Sheet area needed',
        quantity: 'area',
        formula: '=SUM(needed_area)',
        source: 'take-off',
        note: 'Overhang included.',
      }),
      computed({
        name: 'roof_sheet_area',
        label: 'Of it on the roof',
        quantity: 'area',
        formula: '=SUMIFS(needed_area,take_off_part,"roof")',
        source: 'take-off',
      }),
      computed({
        name: 'sheet_area_bought',
        label: 'Sheet area bought',
        quantity: 'area',
        formula: '=SUM(bought_area)',
        source: 'take-off',
      }),
      computed({
        name: 'sheet_waste_ratio',
        label: 'Waste in what is bought',
        quantity: 'ratio',
        formula: '=IF(sheet_area_bought=0,0,1-sheet_area_needed/sheet_area_bought)',
        source: 'definition',
      }),
      computed({
        name: 'sheet_weight',
        label: 'Weight of the sheets',
        quantity: 'mass',
        formula: '=SUM(bought_weight)',
        source: 'take-off',
      }),
    ),
  ],
}
