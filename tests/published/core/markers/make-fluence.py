"""Fluence check values (numpy); run: python3 make-fluence.py"""
import math, numpy as np
from reference_rows import Ref
F = Ref("fluence")
# ---- worked channel-sample profile --------------------------------------
base=np.array([0,2,4,5,6,7,8,10,13,17.]); top=np.array([2,4,5,6,7,8,10,13,17,22.])
C=np.array([0.03,0.04,0.35,4.20,2.60,1.55,0.88,0.36,0.11,0.05]); sC=np.sqrt((0.05*C)**2+0.005**2)
rho=np.array([2.35,2.35,2.30,2.05,2.05,2.10,2.15,2.20,2.30,2.35]); srho=0.10; srho_sys=0.05
bg,sbg=0.035,0.008; dz=top-base; E=C-bg
Fv=float((E*rho*dz).sum())
v_an=((rho*dz*sC)**2).sum(); v_bg=((rho*dz).sum()*sbg)**2; v_rho=((E*dz*srho)**2).sum(); v_rs=((E*dz).sum()*srho_sys)**2; v_cal=(0.03*Fv)**2
# internal boundaries: shared, sd 0.1 cm; outer boundaries likewise
sb=0.1; g=E*rho; db=[-g[0]]+[g[i]-g[i+1] for i in range(len(g)-1)]+[g[-1]]; v_b=sum((d*sb)**2 for d in db)
tot=v_an+v_bg+v_rho+v_rs+v_cal+v_b
F.add("slab sum, all ten channel samples",dict(base_cm=base.tolist(),top_cm=top.tolist(),C_ng_g=C.tolist(),rho=rho.tolist(),bg=bg),Fv,"rel 1e-9","derived F=sum (C-bg) rho dz")
F.add("variance terms (ng/cm2)^2",dict(sigma_C="sqrt((0.05C)^2+0.005^2)",sigma_bg=sbg,sigma_rho_indep=srho,sigma_rho_common=srho_sys,calibration_rel=0.03,sigma_boundary_cm=sb),dict(analytic=v_an,background=v_bg,rho_independent=v_rho,rho_common=v_rs,calibration=v_cal,boundaries=v_b,total_sd=math.sqrt(tot)),"rel 1e-9","derived (first-order propagation)")
rng=np.random.default_rng(20240101); N=1000000
s=np.sqrt(np.log1p((sC/C)**2)); Cd=C*np.exp(s*rng.standard_normal((N,10))-s*s/2)
rd=rho+srho*rng.standard_normal((N,10))+srho_sys*rng.standard_normal((N,1)); bd=bg+sbg*rng.standard_normal((N,1))
bb=np.concatenate([base,top[-1:]]); bd2=bb+sb*rng.standard_normal((N,11)); dzd=np.diff(bd2,axis=1)
cal=1+0.03*rng.standard_normal(N)
Fm=((Cd-bd)*rd*dzd).sum(1)*cal; q=np.quantile(Fm,[.025,.16,.5,.84,.975])
F.add("Monte Carlo of the same case",dict(draws=N,C="lognormal, mean preserved",rho="normal",bg="normal",boundaries="normal, shared",calibration="1+0.03 e on the whole excess C-bg"),dict(mean=Fm.mean(),sd=Fm.std(ddof=1),q025=q[0],q16=q[1],q50=q[2],q84=q[3],q975=q[4]),"abs 0.15 on each","Monte Carlo, own script (any generator)")
# point samples, trapezoid
z=np.array([0,3,5,6,7,9,12,16.]); Cp=np.array([.03,.05,3.8,2.9,1.7,.8,.2,.04])
yy=(Cp-0.035)*2.2; tr=float((0.5*(yy[1:]+yy[:-1])*np.diff(z)).sum())
F.add("point samples, trapezoid",dict(z_cm=z.tolist(),C=Cp.tolist(),bg=.035,rho=2.2),tr,"rel 1e-9","derived")
F.add("point samples, half-distance cells, end cells closed at the end sample",dict(z_cm=z.tolist(),C=Cp.tolist(),bg=.035,rho=2.2),tr,"rel 1e-9 (identical to trapezoid)","derived")
# gap handling
gb=[0,1,3.];gt=[1,2,4.];gc=[2.0,1.0,0.4]
F.add("gap 2-3 cm between channel samples: zero fill / linear fill / nearest fill",dict(base=gb,top=gt,C=gc,bg=0,rho=2),dict(zero=2*(2+1+.4),linear=2*(2+1+.4)+2*0.7,nearest=2*(2+1+.4)+2*0.7,coverage=3/4),"rel 1e-9","derived; linear fill uses mean of adjacent sample values")
F.add("censored slab bounds",dict(C="<0.05",bg=0.02,rho=2,dz=5),dict(lo=(0-0.02)*10,hi=(0.05-0.02)*10),"rel 1e-9","derived")
F.add("tail beyond the top sample, exponential",dict(E_top_ng_g=0.2,L_cm=4,rho=2),0.2*4*2,"rel 1e-12","derived; E_top is the model value at the top edge")
F.add("excess 5 ng/g, 2.2 g/cm3, 1.5 cm",dict(excess_ng_g=5,rho_g_cm3=2.2,dz_cm=1.5),16.5,"rel 1e-12","derived")
F.write()
