import 'server-only';
import { Document, Page, Path, renderToBuffer, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import { formatDate } from '@/lib/dates';
import { formatAcres, formatNumber, formatTenth } from '@/lib/format';
import { CAUTIONS } from '@/lib/ui/cautions';
import { figuresOf, lineName, type PlanLine, type PlanView } from '../model';
import { wholeUnits } from '../seed-math';
import { outlineOf } from './outline';
import { INK, LINE, MUTE, registerFonts } from './pdf-look';

registerFonts();

const MAP_WIDTH = 190;
const MAP_HEIGHT = 170;

const styles = StyleSheet.create({
  page: { fontFamily: 'Public Sans', fontSize: 12, color: INK, paddingTop: 30, paddingBottom: 56, paddingHorizontal: 36 },
  title: { color: MUTE, marginBottom: 8 },
  block: { borderWidth: 1.5, borderColor: INK, padding: 14, marginBottom: 14, flexDirection: 'row', gap: 16 },
  field: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 20 },
  variety: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 34, marginTop: 2 },
  facts: { flexDirection: 'row', flexWrap: 'wrap', marginTop: 10 },
  fact: { width: '50%', marginBottom: 8 },
  label: { color: MUTE, fontSize: 10 },
  value: { fontFamily: 'Bricolage', fontWeight: 700, fontSize: 19 },
  foot: {
    position: 'absolute',
    left: 36,
    right: 36,
    bottom: 22,
    borderTopWidth: 0.5,
    borderTopColor: LINE,
    paddingTop: 5,
    color: MUTE,
    fontSize: 8,
    gap: 2,
  },
});

/** The planting sheet for the cab: large type, two fields a page, nothing that the crew does not need. `madeOn` is an ISO date. */
export async function cabPdf(view: PlanView, madeOn: string): Promise<Buffer> {
  const title = `${view.season} planting sheet of ${view.operationName}`;
  return renderToBuffer(
    <Document title={title} author={view.dealershipName} subject="Planting sheet" language="en">
      <Page size="LETTER" style={styles.page}>
        <Text style={styles.title} fixed>
          {title} · {view.state}
        </Text>
        {view.lines
          .filter((line) => line.variety)
          .map((line) => (
            <Block key={`${line.fieldId} ${line.partName}`} line={line} />
          ))}
        <View style={styles.foot} fixed>
          <Text>
            {CAUTIONS.treatedSeed} {CAUTIONS.herbicide}
          </Text>
          <Text
            render={({ pageNumber, totalPages }) =>
              `Revision ${view.revision} · ${formatDate(madeOn)} · ${pageNumber} of ${totalPages}`
            }
          />
        </View>
      </Page>
    </Document>,
  );
}

function Block({ line }: { line: PlanLine }) {
  const figures = figuresOf(line);
  const outline = outlineOf(line.geometry, MAP_WIDTH, MAP_HEIGHT);
  const facts: [string, string][] = [
    ['Seeds per acre', formatNumber(line.populationSeedsPerAcre)],
    ['Seeds per foot', formatNumber(figures.seedsPerFoot, 2)],
    ['Rows', line.rowWidthInches === null ? '—' : `${line.rowWidthInches} in`],
    ['Pounds per acre', `${figures.poundsAreUsual ? '~' : ''}${formatNumber(figures.poundsPerAcre)}`],
    ['Bags to carry', figures.units === null ? '—' : formatNumber(wholeUnits(figures.units))],
    ['Lot', line.lot?.lotNumber ?? 'any'],
  ];
  return (
    <View style={styles.block} wrap={false}>
      <View style={{ flex: 1 }}>
        <Text style={styles.field}>
          {lineName(line)} · {formatAcres(line.areaAcres)} ac
        </Text>
        {line.farmName ? <Text style={{ color: MUTE }}>{line.farmName}</Text> : null}
        <Text style={styles.variety}>{line.variety?.code}</Text>
        <Text style={{ color: MUTE }}>
          RM {formatTenth(line.variety?.relativeMaturity)}
          {line.lot?.treatment ? ` · ${line.lot.treatment}` : ''}
        </Text>
        <View style={styles.facts}>
          {facts.map(([label, value]) => (
            <View key={label} style={styles.fact}>
              <Text style={styles.label}>{label}</Text>
              <Text style={styles.value}>{value}</Text>
            </View>
          ))}
        </View>
        {figures.largeSeed ? <Text style={{ fontWeight: 700 }}>Large seed: mind the plates.</Text> : null}
        {line.note ? <Text>Note: {line.note}</Text> : null}
      </View>
      <View style={{ width: MAP_WIDTH }}>
        <Svg width={MAP_WIDTH} height={MAP_HEIGHT + 10} viewBox={`0 0 ${MAP_WIDTH} ${MAP_HEIGHT + 10}`}>
          <Path d={outline.path} fill="#fbf8f0" stroke={INK} strokeWidth={1.5} fillRule="evenodd" />
          <Path d={`M4 ${MAP_HEIGHT + 7}h${outline.scaleLength.toFixed(1)}`} stroke={MUTE} strokeWidth={2} />
        </Svg>
        <Text style={styles.label}>{formatNumber(outline.scaleFeet)} ft, north up</Text>
        <Text style={{ ...styles.label, marginTop: 14 }}>Planted on</Text>
        <View style={{ borderBottomWidth: 0.8, borderBottomColor: INK, height: 18 }} />
      </View>
    </View>
  );
}
