"""Box mixing check values (numpy, scipy); run: python3 make-mixing.py"""
import math, numpy as np
from scipy.optimize import brentq, minimize, minimize_scalar
from scipy import stats
from reference_rows import Ref
R=Ref("mixing")
# ---------- box model -----------------------------------------------------
def box_slab(a,b,hb,L,F,rho):
    """mean excess concentration (ng/g) of slab [a,b] cm for a unit box-mixing tail starting at hb"""
    a=np.asarray(a,float); b=np.asarray(b,float)
    lo=np.maximum(a,hb); x=(lo-hb)/L; w=np.maximum(b-lo,0)/L
    return np.where(b>hb, F/(rho*(b-a))*np.exp(-x)*(-np.expm1(-w)),0.0)
R.add("box model point values x=(h-hb)/L",dict(F_ng_cm2=50,rho=2,L_cm=4,x=[-0.01,0,0.5,1,2,5]),[0 if x<0 else 50/(2*4)*math.exp(-x) for x in (-.01,0,.5,1,2,5)],"rel 1e-9","Berger & Heath 1968; derived")
R.add("box model slab mean, slab straddling the base",dict(a=99,b=101,hb=100,L=4,F=50,rho=2),float(box_slab(99,101,100,4,50,2)),"rel 1e-9","derived")
R.add("box model slab mean, thin slab far up the tail (stability)",dict(a=140,b=140.0001,hb=100,L=4,F=50,rho=2),float(box_slab(140,140.0001,100,4,50,2)),"rel 1e-6","derived (expm1)")
R.add("share of the spike above the event surface (x>1)",{},math.exp(-1),"abs 1e-9","derived")
# ---------- worked fit ----------------------------------------------------
base=np.array([60,70,80,85,88,90,92,93,94,95,96,97,98,99,100,102,104,107,110,115,120,130.]); top=np.append(base[1:],140.)
true=dict(hb=94.4,L=3.6,F=42.0,bg=0.040); rho=2.1
mu=box_slab(base,top,true["hb"],true["L"],true["F"],rho)+true["bg"]
eps=np.array([.6,-1.1,.3,1.2,-.4,-.8,.5,1.4,-.7,.2,.9,-1.2,.4,-.3,1.0,-.6,.1,-.9,.8,-.2,.7,-1.3])
sig=np.sqrt((.05*mu)**2+.008**2); Cobs=np.round(mu+sig*eps,4)
sg=np.sqrt((.05*Cobs)**2+.008**2)
def lik_lin(model_unit,fit_bg=True):
    """profile over the linear parameters F (and background): WLS; returns loglik,F,bg"""
    w=1/sg**2; X=np.column_stack([model_unit,np.ones_like(w)]) 
    WX=X*w[:,None]; A=X.T@WX; b=WX.T@Cobs
    try: th=np.linalg.solve(A,b)
    except np.linalg.LinAlgError: return -np.inf,0,0
    r=Cobs-X@th; return -.5*(r*r*w).sum()-np.log(sg).sum()-len(sg)/2*math.log(2*math.pi),th[0],th[1]
n=len(Cobs)
def aicc(ll,k): return -2*ll+2*k+2*k*(k+1)/(n-k-1)
def optimise(f,grid):
    best=max(grid,key=lambda p:f(p)); o=minimize(lambda p:-f(p),best,method="Nelder-Mead",options=dict(xatol=1e-9,fatol=1e-11,maxiter=20000)); return o.x,-o.fun
res={}
# M0 constant
w=1/sg**2; b0=(w*Cobs).sum()/w.sum(); ll0=-.5*((Cobs-b0)**2*w).sum()-np.log(sg).sum()-n/2*math.log(2*math.pi); res["M0 background only"]=(ll0,1)
# M1 thin layer wholly within one sample
best=None
for i in range(n):
    u=np.zeros(n); u[i]=1/(rho*(top[i]-base[i])); l,Fh,bgh=lik_lin(u)
    if best is None or l>best[0]: best=(l,i,Fh,bgh)
res["M1 thin layer, no mixing"]=(best[0],3); m1=best
# M2 box
f2=lambda p: lik_lin(box_slab(base,top,p[0],math.exp(p[1]),1.0,rho))[0]
g=[(h,math.log(L)) for h in np.arange(85,102,.25) for L in (.5,1,2,3,4,6,8,12)]
x2,ll2=optimise(f2,g); L2=math.exp(x2[1]); _,F2,bg2=lik_lin(box_slab(base,top,x2[0],L2,1.0,rho)); res["M2 box mixing"]=(ll2,4)
ta={k:aicc(*v) for k,v in res.items()}; mn=min(ta.values()); wts={k:math.exp(-.5*(v-mn)) for k,v in ta.items()}; sw=sum(wts.values()); wts={k:v/sw for k,v in wts.items()}
# profile intervals for L, hb and h0=hb+L
def prof(par,val):
    if par=="L": o=minimize_scalar(lambda h:-f2((h,math.log(val))),bounds=(91,98),method="bounded",options=dict(xatol=1e-10)); 
    if par=="hb": o=minimize_scalar(lambda l:-f2((val,l)),bounds=(math.log(.3),math.log(30)),method="bounded",options=dict(xatol=1e-10))
    if par=="h0": o=minimize_scalar(lambda l:-f2((val-math.exp(l),l)),bounds=(math.log(.3),math.log(30)),method="bounded",options=dict(xatol=1e-10))
    return -o.fun
def ci(par,c,hat,step):
    g=lambda v:prof(par,v)-(ll2-c); lo=hat
    a=hat
    while g(a)>0: a-=step
    b=hat
    while g(b)>0: b+=step
    return brentq(g,a,a+step,xtol=1e-7),brentq(g,b-step,b,xtol=1e-7)
out=dict(hb=x2[0],L=L2,h0=x2[0]+L2,F=F2,bg=bg2,loglik=ll2)
for par,hat,st in (("L",L2,.1),("hb",x2[0],.02),("h0",x2[0]+L2,.1)):
    out[par+"_68"]=ci(par,.5,hat,st); out[par+"_95"]=ci(par,1.920729,hat,st)
R.add("worked fit: data",dict(base_cm=base.tolist(),top_cm=top.tolist(),C_ng_g=Cobs.tolist(),sigma="sqrt((0.05C)^2+0.008^2)",rho=rho,truth=true),"data row","n/a","invented profile")
R.add("worked fit: box mixing ML, first pass (sigma from the observed C)",dict(data="worked fit: data"),out,"abs 0.02 on cm values; rel 0.5% on F","derived; own optimiser")
# reported estimates: sigma from the fitted model instead of the observed C, three refits, intervals with the last sigma
sg_obs,x2_obs,L2_obs,F2_obs,bg2_obs,ll2_obs=sg,x2,L2,F2,bg2,ll2
for _ in range(3):
    sg=np.sqrt((.05*(F2*box_slab(base,top,x2[0],L2,1.0,rho)+bg2))**2+.008**2)
    x2,ll2=optimise(f2,[x2]); L2=math.exp(x2[1]); _,F2,bg2=lik_lin(box_slab(base,top,x2[0],L2,1.0,rho))
rep=dict(hb=x2[0],L=L2,h0=x2[0]+L2,F=F2,bg=bg2)
for par,hat,st in (("L",L2,.1),("hb",x2[0],.02),("h0",x2[0]+L2,.1)):
    rep[par+"_68"]=ci(par,.5,hat,st); rep[par+"_95"]=ci(par,1.920729,hat,st)
R.add("worked fit: box mixing ML, reported (sigma from the fitted model, 3 refits)",dict(data="worked fit: data",sigma="sqrt((0.05 model)^2+0.008^2)"),rep,"abs 0.02 on cm values; rel 0.5% on F","derived; own optimiser")
sg,x2,L2,F2,bg2,ll2=sg_obs,x2_obs,L2_obs,F2_obs,bg2_obs,ll2_obs
R.add("worked fit: log-likelihoods, k, AICc, weights",dict(data="worked fit: data",n=n),{k:dict(loglik=res[k][0],k=res[k][1],AICc=ta[k],weight=wts[k]) for k in res},"abs 0.05 on AICc","Hurvich & Tsai 1989; derived")
R.add("worked fit: thin layer best sample",dict(data="worked fit: data"),dict(index0=m1[1],base_cm=base[m1[1]],top_cm=top[m1[1]],F=m1[2],bg=m1[3]),"rel 1e-6","derived")
Ssum=float(((Cobs-bg2)*rho*(top-base)).sum()); cen=float(((Cobs-bg2)*rho*(top-base)*(base+top)/2).sum()/Ssum)
R.add("worked fit: slab-sum fluence and excess centroid (model free)",dict(data="worked fit: data",bg=bg2),dict(F=Ssum,centroid_cm=cen),"rel 1e-6","derived; centroid estimates h0 for any G")
# ---------- fossils -------------------------------------------------------
lam,L,hb=3.0,3.6,94.4; h0=hb+L
m=lam*L
R.add("highest find of a taxon that died at the event: Gumbel law",dict(lambda_per_cm=lam,L_cm=L,hb_cm=hb),dict(loc_cm=hb+L*math.log(m),scale_cm=L,median_cm=hb+L*math.log(m)-L*math.log(math.log(2)),mean_cm=hb+L*math.log(m)+0.5772156649015329*L,q95_cm=hb+L*math.log(m)-L*math.log(-math.log(.95)),expected_above_h0=m*math.exp(-1),P_none_above_h0=math.exp(-m*math.exp(-1))),"abs 1e-6","derived")
R.add("P(highest find >= h | died at h0) for h=h0+5,10,20 cm",dict(lambda_per_cm=lam,L_cm=L,h0_cm=h0),[1-math.exp(-m*math.exp(-(h0+d-hb)/L)) for d in (5,10,20)],"abs 1e-9","derived: 1-exp(-lambda L exp(-(h-hb)/L))")
R.add("95% reworking ceiling above event surface for lambda L = 0.1..100",dict(L_cm=1,lambdaL=[.1,1,10,100]),[max(0.0,math.log(v)-math.log(-math.log(.95))-1) for v in (.1,1,10,100)],"abs 1e-6","derived (in units of L)")
R.write()
