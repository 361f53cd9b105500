/** A position in degrees to two decimals: '54.61° N, 1.14° W'. */
export function positionInWords(at: {
  readonly latitude: number;
  readonly longitude: number;
}): string {
  return `${degrees(at.latitude, 'N', 'S')}, ${degrees(at.longitude, 'E', 'W')}`;
}

function degrees(value: number, positive: string, negative: string): string {
  return `${Math.abs(value).toFixed(2)}° ${value < 0 ? negative : positive}`;
}
