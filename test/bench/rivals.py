"""Times FFT convolution and a compiled IIR filter on the grid of the benchmark; prints one JSON line.

Input (stdin): {"points", "everyH", "eliminationRatePerH", "volumeL", "doses": [[point, amountMg], ...], "checkAt": [point, ...]}
"""
import json
import math
import sys
import time

import numpy
import scipy
from scipy.signal import fftconvolve, lfilter

asked = json.load(sys.stdin)
points, keep = asked["points"], math.exp(-asked["eliminationRatePerH"] * asked["everyH"])
train = numpy.zeros(points)
for point, amount in asked["doses"]:
    train[point] += amount / asked["volumeL"]
response = keep ** numpy.arange(points)


def best_ms(work, runs):
    best = math.inf
    for _ in range(runs):
        began = time.perf_counter()
        answer = work()
        best = min(best, time.perf_counter() - began)
    return best * 1000, [float(answer[point]) for point in asked["checkAt"]]


fft_ms, fft_levels = best_ms(lambda: fftconvolve(train, response)[:points], 9)
filter_ms, filter_levels = best_ms(lambda: lfilter([1.0], [1.0, -keep], train), 25)
print(json.dumps({"fftMs": fft_ms, "filterMs": filter_ms, "fftLevels": fft_levels, "filterLevels": filter_levels, "scipy": scipy.__version__}))
