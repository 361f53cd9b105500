/** A length of time as people on a shore write it, hours and whole minutes: '1:16', '0:45'. */
export function hoursAndMinutes(lengthMinutes: number): string {
  const whole = Math.floor(lengthMinutes);
  return `${Math.floor(whole / 60)}:${String(whole % 60).padStart(2, '0')}`;
}
