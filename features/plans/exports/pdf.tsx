import 'server-only';
import { Document, Page, Path, renderToBuffer, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import { formatDate } from '@/lib/dates';
import { formatAcres, formatBand, formatBushels, formatNumber, formatTenth } from '@/lib/format';
import { CAUTIONS } from '@/lib/ui/cautions';
import { columnsFor, type PlanColumn } from '../columns';
import { figuresOf, lineName, type PlanLine, type PlanView, totalsOf } from '../model';
import { outlineOf } from './outline';
import { PdfLedger } from './pdf-ledger';
import { INK, LINE, MUTE, registerFonts } from './pdf-look';

registerFonts();

const styles = StyleSheet.create({
  page: { fontFamily: 'Public Sans', fontSize: 9, color: INK, paddingTop: 36, paddingBottom: 64, paddingHorizontal: 36 },
  trail: { color: MUTE, marginBottom: 2 },
  title: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 20, marginBottom: 8 },
  figures: { flexDirection: 'row', gap: 22, marginBottom: 12 },
  figure: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 13 },
  row: { flexDirection: 'row', borderBottomWidth: 0.5, borderBottomColor: LINE, paddingVertical: 4 },
  head: { borderBottomWidth: 1, borderBottomColor: INK, color: MUTE, fontWeight: 600 },
  total: { borderTopWidth: 1, borderTopColor: INK, borderBottomWidth: 0, fontWeight: 700 },
  cell: { paddingRight: 6, paddingLeft: 2 },
  block: { flexDirection: 'row', gap: 16, borderTopWidth: 1, borderTopColor: INK, paddingTop: 7, paddingBottom: 9 },
  fieldName: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 14 },
  variety: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 18, marginTop: 2 },
  facts: { flexDirection: 'row', flexWrap: 'wrap', marginTop: 6 },
  fact: { width: '33.3%', paddingRight: 8, marginBottom: 4 },
  factLabel: { color: MUTE, fontSize: 7.5 },
  factValue: { fontWeight: 700, fontSize: 10.5 },
  foot: {
    position: 'absolute',
    left: 36,
    right: 36,
    bottom: 24,
    borderTopWidth: 0.5,
    borderTopColor: LINE,
    paddingTop: 5,
    color: MUTE,
    fontSize: 7,
    gap: 2,
  },
});

/** The planting plan as a PDF: one page a farm, then one block a field with its boundary. `madeOn` is an ISO date. */
export async function planPdf(view: PlanView, madeOn: string): Promise<Buffer> {
  return renderToBuffer(<PlanDocument view={view} madeOn={madeOn} />);
}

function PlanDocument({ view, madeOn }: { view: PlanView; madeOn: string }) {
  const farms = new Map<string, PlanLine[]>();
  for (const line of view.lines) {
    const name = line.farmName ?? view.operationName;
    farms.set(name, [...(farms.get(name) ?? []), line]);
  }
  const title = `${view.season} planting plan of ${view.operationName}`;
  return (
    <Document title={title} author={view.dealershipName} subject="Planting plan" language="en">
      {[...farms].map(([farm, lines]) => (
        <Page key={farm} size="LETTER" style={styles.page}>
          <FarmHead view={view} farm={farm} lines={lines} />
          <FarmTable lines={lines} />
          <Lots lines={lines} />
          <Foot view={view} madeOn={madeOn} />
        </Page>
      ))}
      <Page size="LETTER" style={styles.page}>
        <Text style={styles.title}>Field by field</Text>
        {view.lines
          .filter((line) => line.variety)
          .map((line) => (
            <FieldBlock key={`${line.fieldId} ${line.partName}`} line={line} />
          ))}
        <Foot view={view} madeOn={madeOn} />
      </Page>
    </Document>
  );
}

function FarmHead({ view, farm, lines }: { view: PlanView; farm: string; lines: PlanLine[] }) {
  const totals = totalsOf(lines);
  const { relativeMaturityFrom: from, relativeMaturityTo: to } = totals;
  const signed = view.signedName
    ? `agreed by ${view.signedName}, ${formatDate(new Date(view.signedAt ?? 0).toISOString().slice(0, 10))}`
    : view.state;
  const figures: [string, string][] = [
    [formatAcres(totals.acres), `acres, ${totals.fields} ${totals.fields === 1 ? 'field' : 'fields'}`],
    [formatBushels(totals.expectedPerAcre), 'bu/ac expected'],
    [formatNumber(totals.units), 'units'],
    [
      from === null || to === null ? '—' : from === to ? formatTenth(from) : `${formatTenth(from)}–${formatTenth(to)}`,
      'RM spread',
    ],
  ];
  return (
    <View>
      <Text style={styles.trail}>
        {view.dealershipName} · {view.operationName} · {signed}
      </Text>
      <Text style={styles.title}>
        {view.season} planting plan, {farm}
      </Text>
      <View style={styles.figures}>
        {figures.map(([value, label]) => (
          <View key={label}>
            <Text style={styles.figure}>{value}</Text>
            <Text style={{ color: MUTE }}>{label}</Text>
          </View>
        ))}
      </View>
    </View>
  );
}

function FarmTable({ lines }: { lines: PlanLine[] }) {
  const columns = columnsFor('pdf', false);
  const totals = totalsOf(lines);
  const cell = (column: PlanColumn, text: string, weight?: number) => (
    <Text
      key={column.id}
      style={[
        styles.cell,
        { flex: column.width, textAlign: column.numeric ? 'right' : 'left' },
        weight ? { fontWeight: weight } : {},
      ]}
    >
      {text}
    </Text>
  );
  return (
    <View>
      <View style={[styles.row, styles.head]} fixed>
        {columns.map((column) => cell(column, column.label))}
      </View>
      {lines.map((line) => (
        <View key={`${line.fieldId} ${line.partName}`} style={styles.row} wrap={false}>
          {columns.map((column) =>
            cell(column, column.text(line, figuresOf(line)), ['field', 'variety', 'expected'].includes(column.id) ? 700 : 400),
          )}
        </View>
      ))}
      <View style={[styles.row, styles.total]} wrap={false}>
        {columns.map((column) => cell(column, column.total?.(totals) ?? ''))}
      </View>
    </View>
  );
}

function Lots({ lines }: { lines: PlanLine[] }) {
  const lots = totalsOf(lines).varieties.flatMap((one) => one.lots);
  if (lots.length === 0) return null;
  return (
    <View style={{ marginTop: 10 }} wrap={false}>
      <Text style={{ fontWeight: 700, marginBottom: 2 }}>Seed to load</Text>
      {lots.map((lot) => (
        <Text key={`${lot.variety.id} ${lot.lot?.id ?? ''}`} style={{ marginBottom: 1 }}>
          {formatNumber(lot.units)} units of {lot.variety.code}, {lot.lot ? `lot ${lot.lot.lotNumber}` : 'any lot'} for{' '}
          {formatAcres(lot.acres)} ac{lot.lot?.treatment ? ` (${lot.lot.treatment})` : ''}
        </Text>
      ))}
      <Text style={{ color: MUTE, marginTop: 2 }}>Rounded up to whole units once per lot.</Text>
    </View>
  );
}

function FieldBlock({ line }: { line: PlanLine }) {
  const figures = figuresOf(line);
  const outline = outlineOf(line.geometry, 150, 100);
  const facts: [string, string][] = [
    ['Seeds per acre', formatNumber(line.populationSeedsPerAcre)],
    ['Rows', line.rowWidthInches === null ? '—' : `${line.rowWidthInches} in`],
    ['Seeds per foot', formatNumber(figures.seedsPerFoot, 2)],
    ['Units', formatNumber(figures.units, 1)],
    ['Pounds per acre', `${figures.poundsAreUsual ? '~' : ''}${formatNumber(figures.poundsPerAcre)}`],
    ['Lot', line.lot?.lotNumber ?? 'any'],
  ];
  return (
    <View style={styles.block} wrap={false}>
      <View style={{ width: 150 }}>
        <Svg width={150} height={108} viewBox="0 0 150 108">
          <Path d={outline.path} fill="#fbf8f0" stroke={INK} strokeWidth={1} fillRule="evenodd" />
          <Path d={`M4 106h${outline.scaleLength.toFixed(1)}`} stroke={MUTE} strokeWidth={1.5} />
          <Path d="M144 16V4M141 8L144 4L147 8" stroke={MUTE} strokeWidth={0.8} fill="none" />
        </Svg>
        <Text style={styles.factLabel}>{formatNumber(outline.scaleFeet)} ft, north up</Text>
      </View>
      <View style={{ flex: 1 }}>
        <Text style={styles.fieldName}>
          {lineName(line)} · {formatAcres(line.areaAcres, 2)} ac
        </Text>
        <Text style={styles.variety}>
          {line.variety?.code} · RM {formatTenth(line.variety?.relativeMaturity)}
        </Text>
        <View style={styles.facts}>
          {facts.map(([label, value]) => (
            <View key={label} style={styles.fact}>
              <Text style={styles.factLabel}>{label}</Text>
              <Text style={styles.factValue}>{value}</Text>
            </View>
          ))}
        </View>
        {figures.largeSeed ? (
          <Text style={{ marginBottom: 4, fontWeight: 600 }}>Large seed: mind the plates (common practice).</Text>
        ) : null}
        {line.lot?.treatment ? <Text style={{ marginBottom: 4 }}>Treatment on the tag: {line.lot.treatment}.</Text> : null}
        {line.note ? <Text style={{ marginBottom: 4 }}>Note: {line.note}</Text> : null}
        {line.assessment ? (
          <View>
            <Text style={{ fontWeight: 700 }}>
              {formatBushels(line.assessment.expected)} bu/ac expected, {formatBand(line.assessment.low, line.assessment.high)}
            </Text>
            <PdfLedger assessment={line.assessment} />
          </View>
        ) : (
          <Text style={{ color: MUTE }}>Not scored: no expected yield.</Text>
        )}
      </View>
    </View>
  );
}

function Foot({ view, madeOn }: { view: PlanView; madeOn: string }) {
  return (
    <View style={styles.foot} fixed>
      <Text>
        {CAUTIONS.yield} {CAUTIONS.treatedSeed} {CAUTIONS.herbicide}
      </Text>
      <Text
        render={({ pageNumber, totalPages }) =>
          `${view.operationName} · ${view.season} · revision ${view.revision} · ${formatDate(madeOn)} · ${pageNumber} of ${totalPages}`
        }
      />
    </View>
  );
}
