import type { AcceptanceReason } from '#shared/domain/tides/official-table-acceptance.ts';
import type { TableComparison } from '#shared/domain/tides/official-table-comparison.ts';
import type { TableRefusal } from '#shared/domain/tides/official-table-reading.ts';

/** One sentence on why a text as a whole is no table of tides. */
export function sayTableRefusal(reason: TableRefusal): string {
  switch (reason.why) {
    case 'empty':
      return 'There is nothing in it.';
    case 'too-large':
      return 'This is far more than a year of tides.';
    case 'spreadsheet':
      return 'This is a spreadsheet file. Save it as text (CSV) and choose that.';
    case 'not-text':
      return 'This is not a text file.';
    case 'header-only':
      return 'There is a heading and nothing below it.';
    case 'not-a-table':
      return 'No rows with a date, a time and a height were found in it.';
    case 'columns-unclear':
      return 'It cannot be told which column holds the dates, the times and the heights.';
    case 'units-unclear':
      return 'It cannot be told whether heights are in metres, centimetres or feet. Say which.';
    case 'year-needed':
      return 'The dates have no year. Say which year it is.';
    case 'date-order-unclear':
      return `It cannot be told whether ${reason.example} begins with the day or the month. Say which.`;
    case 'no-such-zone':
      return `There is no time zone called ${reason.zone}.`;
  }
}

/** One sentence on how a table agrees with the prediction, or what it looks like instead. */
export function sayComparison(comparison: TableComparison): string {
  const { verdict, constantMinutes, constantWithin, constantM } = comparison;
  switch (verdict) {
    case 'agrees':
      return 'It agrees with the prediction for this station.';
    case 'zone-mistake': {
      const minutes = constantMinutes ?? 0;
      const amount = `${Math.abs(minutes)} minutes ${minutes < 0 ? 'early' : 'late'}`;
      return constantWithin === null
        ? `Throughout it is ${amount}: it looks as if it were printed in another time zone.`
        : `For a part of the year it is ${amount}: it looks as if summer time were read as winter time, or the other way round.`;
    }
    case 'datum': {
      const metres = constantM ?? 0;
      return `Throughout it is ${Math.abs(metres).toFixed(2)} m ${metres < 0 ? 'lower' : 'higher'}: it looks as if its heights were above another datum.`;
    }
    case 'units':
      return 'Its heights stand in a constant proportion to the prediction: it looks as if they were in other units.';
    case 'swapped':
      return 'Its high waters are lower than its low waters: the marks look exchanged.';
    case 'other-place':
      return 'Its times or heights are too far from the prediction: it looks like the table of another place.';
  }
}

/** One sentence on why a table may not be put in force. */
export function sayAcceptance(reason: AcceptanceReason): string {
  switch (reason.why) {
    case 'not-read':
      return sayTableRefusal(reason.refusal);
    case 'too-few-events':
      return 'There are too few high and low waters in it.';
    case 'looks-like-a-mistake':
      return sayComparison(reason.comparison);
    case 'rows-in-doubt':
      return 'Some rows could not be read. Mend them, or say that they are left out.';
  }
}
