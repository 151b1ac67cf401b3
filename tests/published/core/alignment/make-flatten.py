"""Expected values of flatten.json: piecewise linear stretch between marker heights, errors to first order.

Shares no line with the program. Run with Python 3 to print the values.
"""
import math


def flat(z,mk,tg,sz=0,sm=None,st=None,mode='gain'):
    """piecewise-linear stretch; mk ascending marker heights, tg target heights"""
    K=len(mk);sm=sm or [0]*K;st=st or [0]*K
    if K==1: g=1.0;zz=tg[0]+(z-mk[0]);return zz,sz**2+sm[0]**2+st[0]**2
    if z<=mk[0]: k=0
    elif z>=mk[-1]: k=K-2
    else: k=max(i for i in range(K-1) if mk[i]<=z)
    g=(tg[k+1]-tg[k])/(mk[k+1]-mk[k])
    if mode=='rigid' and z<mk[0]: return tg[0]+(z-mk[0]),sz**2+sm[0]**2+st[0]**2
    if mode=='rigid' and z>mk[-1]: return tg[-1]+(z-mk[-1]),sz**2+sm[-1]**2+st[-1]**2
    u=(z-mk[k])/(mk[k+1]-mk[k])
    v=g*g*(sz**2+(1-u)**2*sm[k]**2+u*u*sm[k+1]**2)+(1-u)**2*st[k]**2+u*u*st[k+1]**2
    return tg[k]+u*(tg[k+1]-tg[k]),v


for z in (1, 2, 3.5, 5, 8, 11, 14):
    for mode in ("gain", "rigid"):
        common, variance = flat(z, [2.0, 5.0, 11.0], [0.0, 4.0, 10.0], 0.02, [0.05, 0.1, 0.2], mode=mode)
        print(z, mode, repr(common), repr(math.sqrt(variance)))
