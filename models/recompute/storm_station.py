"""04-storm-station: every pump and screen kept apart, 128 states."""

from mpmath import mpf

from markov import Sheet, earnings, entering, explore, stationary, transient

life, fix = mpf(1) / 900, mpf(1) / 11
clog, rake = mpf(4) / 730, mpf(1) / 3
mains, mains_fix, diesel, diesel_fix = mpf(3) / 8760, mpf(1) / 2, mpf(8) / 8760, mpf(1) / 20
fitters, inflow = 2, 2

# A state: 0 or 1 (works) of pump 1, 2, 3, screen 1, 2, mains, diesel.


def rates(state):
    pumps_down = 3 - sum(state[0:3])
    screens_down = 2 - sum(state[3:5])
    for_pumps = min(fitters, pumps_down)
    for_screens = min(fitters - for_pumps, screens_down)
    for i in range(7):
        other = state[:i] + (1 - state[i],) + state[i + 1:]
        if i < 3:
            yield other, life if state[i] else fix * for_pumps / pumps_down
        elif i < 5:
            yield other, clog if state[i] else rake * for_screens / screens_down
        elif i == 5:
            yield other, mains if state[i] else mains_fix
        else:
            yield other, diesel if state[i] else diesel_fix


def power(s):
    return s[5] + s[6] > 0


def capacity(s):
    return mpf(min(sum(s[0:3]), 2 * sum(s[3:5]))) if power(s) else mpf(0)


def shortfall(s):
    return max(mpf(0), inflow - capacity(s))


def behind(s):
    return shortfall(s) > 0


def one(holds):
    return lambda s: mpf(1 if holds(s) else 0)


begin = (0, 1, 1, 1, 1, 1, 1)
start = {begin: mpf(1)}
chain = explore(start, rates)
assert len(chain) == 128
month = mpf(730)

sheet = Sheet("04-storm-station", 48, "pumps, screens and both supplies kept apart (128 states), 45 digits")
for t in (1, 12, 730):
    sheet.add("keeping_up", transient(chain, start, mpf(t), [one(lambda s: not behind(s))])[0][0], "uniformization", t)
pi = stationary(chain)
p_behind = sum(p for s, p in pi.items() if behind(s))
inward = entering(chain, behind)
flow = sum(p * inward(s) for s, p in pi.items())
sheet.add("behind", p_behind, "elimination without subtraction")
sheet.add("capacity_lr", sum(p * capacity(s) for s, p in pi.items()), "elimination without subtraction")
carried, spilt = transient(chain, start, month, (), [capacity, lambda s: 600 * shortfall(s)])[1]
sheet.add("capacity_mo", carried / month, "uniformization, tail weights", month)
sheet.add("spill_month", spilt, "uniformization, tail weights", month)
sheet.add("spill_until", earnings(chain, power, lambda s: 600 * shortfall(s))[begin], "elimination")
sheet.add("dry_spell", p_behind / flow, "probability / frequency")
sheet.add("frequency", flow, "flow in the stationary state")
sheet.add("to_blackout", earnings(chain, power, lambda s: 1)[begin], "elimination")
sheet.add("clogs", sum(p * clog * sum(s[3:5]) for s, p in pi.items()), "elimination without subtraction")
sheet.write()
