"""02-safety-valves: the two valves kept apart, nine states."""

from mpmath import mpf

from markov import Sheet, earnings, entering, explore, first_moments, killed, stationary, transient

hidden, shown, common = mpf(700) / 10**9, mpf(1500) / 10**9, mpf(40) / 10**9
found, repair = mpf(1) / 4380, mpf(1) / 24


def rates(state):
    jobs = state.count("tagged")
    for i, one in enumerate(state):
        def to(other):
            return state[:i] + (other,) + state[i + 1:]
        if one == "ready":
            yield to("stuck"), hidden
            yield to("tagged"), shown
        elif one == "stuck":
            yield to("tagged"), found
        else:
            yield to("ready"), repair / jobs
    if "ready" in state:
        yield tuple("stuck" if one == "ready" else one for one in state), common


start = {("ready", "ready"): mpf(1)}
chain = explore(start, rates)
assert len(chain) == 9


def helpless(state):
    return "ready" not in state


def alarm(state):
    return "tagged" in state


def one(holds):
    return lambda s: mpf(1 if holds(s) else 0)


year = mpf(8760)
sheet = Sheet("02-safety-valves", 6, "both valves kept apart (9 states), 45 digits")
for t in (mpf(730), year, 10 * year):
    sheet.add("unavailable", transient(chain, start, t, [one(helpless)])[0][0], "uniformization", t)
t = 10 * year
down, losses, alarms = transient(chain, start, t, (), [one(helpless), entering(chain, helpless), entering(chain, alarm)])[1]
sheet.add("pfd", down / t, "uniformization, tail weights", t)
pi = stationary(chain)
sheet.add("long_run", sum(p for s, p in pi.items() if helpless(s)), "elimination without subtraction")
dead = killed(chain, lambda s: not helpless(s))
for t in (year, 10 * year):
    sheet.add("lost", transient(dead, start, t, [one(helpless)])[0][0], "uniformization of the chain that stops there", t)
sheet.add("losses", losses, "uniformization, tail weights", 10 * year)
inward = entering(chain, helpless)
sheet.add("frequency", sum(p * inward(s) for s, p in pi.items()), "flow in the stationary state")
mean, spread = first_moments(chain, start, lambda s: not helpless(s))
sheet.add("to_loss", mean, "elimination")
sheet.add("loss_spread", spread, "elimination, second moment")
sheet.add("alarms", alarms, "uniformization, tail weights", 10 * year)
sheet.write()
