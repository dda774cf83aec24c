import { foldName } from './names';

/** What a column may be by its name alone. `stamp` is date and time in one cell, `clock` a time that may need a date. */
export type HeaderMeaning =
  | 'stamp'
  | 'date'
  | 'clock'
  | 'lot'
  | 'product'
  | 'characteristic'
  | 'gauge'
  | 'value'
  | 'unit'
  | 'serial'
  | 'position'
  | 'quantity'
  | 'remark'
  | 'known';

/** Names in English and German, folded when the table is built; `known` ones are ordinary and not used. */
const NAMES: Record<HeaderMeaning, string> = {
  stamp:
    'timestamp, date time, date and time, measured at, measurement time, reading time, sample time, sampled at, taken at, zeitstempel, datum uhrzeit, datum zeit, datum und zeit, datum und uhrzeit, zeitpunkt, messzeit, messzeitpunkt',
  date: 'date, day, measurement date, sample date, datum, tag, messdatum, prüfdatum, pruefdatum',
  clock: 'time, time of day, clock, clock time, zeit, uhrzeit',
  lot: 'lot, lot no, lot nr, lot number, lot id, lot code, batch, batch no, batch nr, batch number, batch id, charge, chargen nr, chargennummer, charge nr, los, los nr, losnummer, partie',
  product:
    'product, product code, product name, product no, part, part no, part nr, part number, article, article no, item, item no, material, material no, sku, grade, produkt, produktcode, produkt nr, artikel, artikel nr, artikelnummer, materialnummer, material nr, teil, teile nr, teilenummer, sorte',
  characteristic:
    'characteristic, channel, channel name, measurand, parameter, feature, quantity measured, merkmal, prüfmerkmal, pruefmerkmal, kanal, messgröße, messgroesse, kenngröße, kenngroesse',
  gauge:
    'gauge, gauge no, gauge id, gauge asset, gauge asset no, gauge number, asset, asset no, asset number, instrument, sensor, measuring point, messmittel, messmittel nr, messgerät, messgeraet, prüfmittel, pruefmittel, prüfmittel nr, messstelle',
  value:
    'value, reading, measured value, measurement, measurement value, result, actual, actual value, wert, messwert, ist, istwert, ergebnis, messergebnis, ablesung',
  unit: 'unit, units, unit of measure, uom, einheit, maßeinheit, masseinheit',
  serial:
    'serial, serial no, serial nr, serial number, sn, piece, piece no, sample, sample no, sample id, seriennummer, serien nr, teil id, probe, proben nr, probennummer, stück nr, stueck nr',
  position:
    'position, pos, measuring position, location, lane, track, zone, cavity, nest, spindle, messposition, spur, bahn, kavität, kavitaet, spindel',
  quantity:
    'quantity, qty, lot size, lot quantity, batch size, batch quantity, menge, losgröße, losgroesse, chargengröße, chargenmenge, stückzahl, stueckzahl',
  remark:
    'remark, remarks, comment, comments, note, notes, bemerkung, bemerkungen, kommentar, hinweis, notiz, anmerkung',
  known:
    'shift, line, machine, station, operator, inspector, order, order no, work order, nominal, target, lsl, usl, lower specification limit, upper specification limit, lcl, ucl, no, nr, row, index, id, status, ok, judgement, mean, average, range, schicht, linie, anlage, maschine, bediener, prüfer, pruefer, auftrag, auftrags nr, auftragsnummer, nennwert, nennmaß, sollwert, soll, usg, osg, ugw, ogw, lfd nr, mittelwert, spannweite',
};

const MEANINGS = new Map<string, HeaderMeaning>(
  Object.entries(NAMES).flatMap(([meaning, names]) =>
    names.split(',').map((name) => [foldName(name), meaning as HeaderMeaning] as const),
  ),
);

/** The meaning of a folded header name, or undefined. */
export const meaningOf = (folded: string): HeaderMeaning | undefined => MEANINGS.get(folded);

const SUMMARY =
  /^(total|sum|average|avg|mean|median|min|minimum|max|maximum|range|count|std|stdev|std\.? ?dev\.?|standard deviation|sigma|s|n|cp|cpk|pp|ppk|summe|gesamt|mittelwert|mittel|durchschnitt|anzahl|spannweite|standardabweichung|streuung|ø)\s*[:=]?$/i;

/** Whether a text labels a row of totals or averages. */
export const isSummaryLabel = (text: string): boolean => SUMMARY.test(text.trim());

const CHECK_STANDARD =
  /^(master|ref|reference|chk|check|check ?(part|piece|standard)|zero|standard|einstellmeister|referenz|prüfnormal|normal|nullpunkt)[ _-]?\d{0,3}$/i;

/** Whether a lot, serial or product text says that a check standard was measured, and no product. */
export const isCheckStandardLabel = (text: string): boolean => CHECK_STANDARD.test(text.trim());
