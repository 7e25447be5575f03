import { type Command, parseOptions, refuse } from './command';
import { problemLine, readSoilFiles } from './soil-files';

export const soilCommand: Command = {
  summary: 'soil tests from any laboratory, in one shape',
  usage: `hilum soil FILE [FILE…]

  FILE  CSV, TSV, XLS or XLSX, Modus (XML or JSON), a zipped point shapefile or a .shp with its parts beside it.
        Several files are joined by sample number.

Prints {format,laboratory,samples:[{id,depthInches:[from,to],ph,saltPh,bufferPh,bufferMethod,organicMatterPercent,cec,
phosphorusPpm,potassiumPpm,longitude,latitude}],notes:[…],problems:[…]}; null where absent.`,
  async run(argv) {
    const { positionals } = parseOptions(argv, {});
    if (positionals.length === 0) return refuse('Name one or more files of soil tests.');
    const { format, laboratory, samples, notes, problems } = await readSoilFiles(positionals);
    const lines = problems.map(problemLine);
    return {
      value: {
        format,
        laboratory,
        samples: samples.map((sample) => ({
          id: sample.id,
          depthInches: sample.depthInches,
          ph: sample.ph,
          saltPh: sample.saltPh,
          bufferPh: sample.bufferPh,
          bufferMethod: sample.bufferMethod,
          organicMatterPercent: sample.organicMatterPercent,
          cec: sample.cec,
          phosphorusPpm: sample.phosphorusPpm,
          potassiumPpm: sample.potassiumPpm,
          longitude: sample.longitude,
          latitude: sample.latitude,
        })),
        notes,
        problems: lines,
      },
      notes: lines,
      bad: samples.length === 0,
    };
  },
};
