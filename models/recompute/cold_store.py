"""05-cold-store: rules written out in Python; running compressors, seals, order under way, degrees."""

from mpmath import mpf

from markov import Sheet, earnings, entering, explore, killed, stationary, transient

life, fit = mpf(1) / 60, mpf(24) / 8
paper, delivery = mpf(1), mpf(1) / 9
reorder, lot, shelf = 2, 4, 6
drift, pull = mpf(24) / 5, mpf(24) / 2


def rates(state):
    running, seals, ordered, warmth = state
    yield (running - 1, seals, ordered, warmth), life * running
    if running < 4 and seals > 0:
        yield (running + 1, seals - 1, ordered, warmth), fit
    if seals <= reorder and not ordered:
        yield (running, seals, 1, warmth), paper
    if ordered:
        yield (running, seals + lot, 0, warmth), delivery
    if running < 3 and warmth < 5:
        yield (running, seals, ordered, warmth + 1), drift
    if running >= 3 and warmth > 0:
        yield (running, seals, ordered, warmth - 1), pull


def spoiled(s):
    return s[3] >= 4


def one(holds):
    return lambda s: mpf(1 if holds(s) else 0)


def cost(s):
    running, seals, ordered, _ = s
    mends = fit if running < 4 and seals > 0 else 0
    orders = paper if seals <= reorder and not ordered else 0
    return 35 * seals + (4000 if spoiled(s) else 0) + 310 * mends + 60 * orders


begin = (4, shelf, 0, 0)
start = {begin: mpf(1)}
chain = explore(start, rates)
assert max(s[1] for s in chain) == shelf

sheet = Sheet("05-cold-store", len(chain), "rules written out again in Python, 45 digits")
for t in (1, 30):
    sheet.add("warm", transient(chain, start, mpf(t), [one(spoiled)])[0][0], "uniformization", t)
pi = stationary(chain)
p_spoiled = sum(p for s, p in pi.items() if spoiled(s))
sheet.add("warm_lr", p_spoiled, "elimination without subtraction")
sheet.add("no_seal", sum(p for s, p in pi.items() if s[1] == 0), "elimination without subtraction")
sheet.add("seals_lr", sum(p * s[1] for s, p in pi.items()), "elimination without subtraction")
sheet.add("cost_rate", sum(p * cost(s) for s, p in pi.items()), "elimination without subtraction")
sheet.add("cost_month", transient(chain, start, mpf(30), (), [cost])[1][0], "uniformization, tail weights", 30)
sheet.add("first_spoil", earnings(chain, lambda s: not spoiled(s), lambda s: 1)[begin], "elimination")
stopped = killed(chain, lambda s: not spoiled(s))
sheet.add("season", transient(stopped, start, mpf(90), [one(spoiled)])[0][0], "uniformization of the chain that stops there", 90)
inward = entering(chain, lambda s: s[2] == 1)
sheet.add("orders", sum(p * inward(s) for s, p in pi.items()), "flow in the stationary state")
inward = entering(chain, spoiled)
sheet.add("spoil_spell", p_spoiled / sum(p * inward(s) for s, p in pi.items()), "probability / frequency")
sheet.write()
