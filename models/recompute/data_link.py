"""03-data-link: the five states written out by hand."""

from mpmath import mpf

from markov import Sheet, earnings, entering, first_moments, killed, stationary, transient

cuts, splice = mpf("1.2") / 8760, mpf(1) / 14
ageing, wear = mpf("0.2") / 8760, mpf("0.6") / 8760
travel, by_hand, takes = mpf(1) / 5, mpf(60) / 40, mpf("0.97")

# u: fibre up; c: fibre cut; then the radio: idle, failed, carrying, stuck.
chain = {
    "u idle": {"c carrying": cuts * takes, "c stuck": cuts * (1 - takes), "u failed": ageing},
    "u failed": {"c failed": cuts, "u idle": travel},
    "c carrying": {"u idle": splice, "c failed": wear},
    "c stuck": {"u idle": splice, "c carrying": by_hand},
    "c failed": {"u failed": splice, "c carrying": travel},
}
start = {"u idle": mpf(1)}


def passing(state):
    return state[0] == "u" or state == "c carrying"


def dark(state):
    return not passing(state)


def one(holds):
    return lambda s: mpf(1 if holds(s) else 0)


year, quarter = mpf(8760), mpf(2160)
sheet = Sheet("03-data-link", 5, "five states written out by hand, 45 digits")
for t in (1, 24, 8760):
    sheet.add("available", transient(chain, start, mpf(t), [one(passing)])[0][0], "uniformization", t)
pi = stationary(chain)
down = sum(p for s, p in pi.items() if dark(s))
inward = entering(chain, dark)
flow = sum(p * inward(s) for s, p in pi.items())
sheet.add("down", down, "elimination without subtraction")
time_down, outages = transient(chain, start, year, (), [one(dark), inward])[1]
sheet.add("downtime", time_down, "uniformization, tail weights", year)
sheet.add("outages", outages, "uniformization, tail weights", year)
sheet.add("frequency", flow, "flow in the stationary state")
sheet.add("down_spell", down / flow, "probability / frequency")
sheet.add("up_spell", sum(p for s, p in pi.items() if passing(s)) / flow, "probability / frequency")
sheet.add("first", first_moments(chain, start, passing)[0], "elimination")
sheet.add("radio_risk", earnings(chain, passing, one(lambda s: s.endswith("failed")))["u idle"], "elimination")
sheet.add("lost_data", time_down * 540, "540 GB an hour x downtime", year)
stopped = killed(chain, passing)
sheet.add("quarter_bad", transient(stopped, start, quarter, [one(dark)])[0][0], "uniformization of the chain that stops there", quarter)
sheet.write()
