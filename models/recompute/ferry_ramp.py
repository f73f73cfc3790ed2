"""01-ferry-ramp: closed forms of the two-state unit (IEC 61703; Trivedi 2002, ch. 8; attributions from memory)."""

from mpmath import mp, mpf

from markov import Sheet

l, m = mpf(5) / 8760, mpf(1) / 6
s = l + m
year, month = mpf(8760), mpf(720)


def closed(t):
    return l / s * (1 - mp.exp(-s * t))


def down(t):
    return l / s * t - l / s ** 2 * (1 - mp.exp(-s * t))


sheet = Sheet("01-ferry-ramp", 2, "closed forms of the two-state unit, 45 digits")
for t in (0, 6, 24, year):
    sheet.add("available", 1 - closed(t), "m/s + l/s exp(-s t), s = l + m", t)
sheet.add("long_run", l / s, "l/s")
sheet.add("in_a_year", down(year) / year, "(l/s) - l/(s^2 t) (1 - exp(-s t))", year)
sheet.add("waiting", down(year), "l t/s - l/s^2 (1 - exp(-s t))", year)
entries = l * (year - down(year))
sheet.add("closures", entries, "l times the time spent ready", year)
sheet.add("yearly_loss", 900 * down(year) + 200 * entries, "900 x time jammed + 200 x jams", year)
sheet.add("month", mp.exp(-l * month), "exp(-l t)", month)
sheet.add("month_bad", -mp.expm1(-l * month), "1 - exp(-l t)", month)
sheet.add("to_jam", 1 / l, "1/l")
sheet.add("jam_spread", 1 / l, "1/l: the time is exponential")
sheet.add("half_jammed", mp.log(2) / l, "ln 2 / l")
sheet.add("spell", 1 / m, "1/m")
sheet.write()
