const MS_PER_MIN = 60_000;

/**
 * A function from an instant, ms since 1970 UTC, to the zone's lead on UTC, min.
 * @param zone IANA name, such as `America/Phoenix`
 * @throws RangeError on a zone that is not known
 */
export function zoneOffset(zone: string): (instantMs: number) => number {
  const format = zoneFormat(zone);
  return (instantMs) => {
    const field: Record<string, number> = {};
    for (const part of format.formatToParts(instantMs)) field[part.type] = Number(part.value);
    const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = field;
    const wallMs = Date.UTC(year, month - 1, day, hour, minute, second);
    return Math.round((wallMs - instantMs) / MS_PER_MIN);
  };
}

/** Whether the tables of this machine know a zone. */
export function zoneIsKnown(zone: string): boolean {
  try {
    zoneFormat(zone);
    return true;
  } catch {
    return false;
  }
}

function zoneFormat(zone: string): Intl.DateTimeFormat {
  try {
    return new Intl.DateTimeFormat('en-US', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
    });
  } catch (cause) {
    throw new RangeError(`time zone not known: ${zone}`, { cause });
  }
}
